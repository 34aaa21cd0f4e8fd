import { useEffect } from "preact/hooks";
import type { CaseModel } from "./case-model.ts";

/** Ctrl+Z undoes, Ctrl+Shift+Z or Ctrl+Y does again (Command on a Mac); in a text field the keys stay the field's own. */
export function useUndoKeys(model: CaseModel): void {
  useEffect(() => {
    const pressed = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey || writesIn(event.target)) return;
      const key = event.key.toLowerCase();
      const redo = (key === "z" && event.shiftKey) || (key === "y" && !event.shiftKey);
      if (!redo && key !== "z") return;
      event.preventDefault();
      if (redo) model.redo();
      else model.undo();
    };
    addEventListener("keydown", pressed);
    return () => removeEventListener("keydown", pressed);
  }, [model]);
}

function writesIn(target: EventTarget | null): boolean {
  if (target instanceof HTMLTextAreaElement) return true;
  return target instanceof HTMLInputElement && target.type === "text";
}
