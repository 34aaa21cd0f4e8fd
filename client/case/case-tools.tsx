import type { CasePage } from "./case-page.ts";

/** In reach wherever the page is scrolled to: undo, redo, and whether anything typed is not yet saved. */
export function CaseTools({ page, kept }: { page: CasePage; kept: boolean }) {
  const { model } = page;
  return (
    <div class="case-tools">
      <span class="soft">{sayKept(page.unsaved.value, kept)}</span>
      <button type="button" class="button" disabled={!model.canUndo.value} onClick={model.undo} aria-keyshortcuts="Control+Z">
        Undo
      </button>
      <button type="button" class="button" disabled={!model.canRedo.value} onClick={model.redo} aria-keyshortcuts="Control+Shift+Z">
        Redo
      </button>
    </div>
  );
}

function sayKept(unsaved: boolean, kept: boolean): string {
  if (!unsaved) return "All saved";
  return kept ? "Unsaved; kept in this browser" : "Not saved, and this browser keeps nothing: save before you leave";
}
