import type { Keeping } from "../keeping/keep-while-open.ts";
import type { CasePage } from "./case-page.ts";

/** In reach wherever the page is scrolled to: undo, redo, and whether anything typed is not yet saved. */
export function CaseTools({ page, keeping }: { page: CasePage; keeping: Keeping }) {
  const { model } = page;
  return (
    <div class="case-tools">
      <span class="soft">
        {page.unsaved.value ? "Unsaved" : "All saved"}
        {page.unsaved.value && (
          <span class={keeping === "kept" ? "kept-words" : undefined}>{keepingWords[keeping]}</span>
        )}
      </span>
      <button
        type="button"
        class="button"
        disabled={!model.canUndo.value}
        onClick={model.undo}
        aria-keyshortcuts="Control+Z"
      >
        Undo
      </button>
      <button
        type="button"
        class="button"
        disabled={!model.canRedo.value}
        onClick={model.redo}
        aria-keyshortcuts="Control+Shift+Z"
      >
        Redo
      </button>
    </div>
  );
}

const keepingWords: Readonly<Record<Keeping, string>> = {
  kept: "; kept in this browser",
  refused: ", and this browser keeps nothing: save before you leave",
  "other-tab": ", and the case is open in another tab: save before you leave",
};
