import type { CasePage } from "./case-page.ts";

/** In reach wherever the page is scrolled to: undo, redo, and whether anything typed is not yet saved. */
export function CaseTools({ page, kept }: { page: CasePage; kept: boolean }) {
  const { model } = page;
  return (
    <div class="case-tools">
      <span class="soft">
        {page.unsaved.value ? "Unsaved" : "All saved"}
        {page.unsaved.value && <span class={kept ? "kept-words" : undefined}>{sayKept(kept)}</span>}
      </span>
      <button type="button" class="button" disabled={!model.canUndo.value} onClick={model.undo} aria-keyshortcuts="Control+Z">
        Undo
      </button>
      <button type="button" class="button" disabled={!model.canRedo.value} onClick={model.redo} aria-keyshortcuts="Control+Shift+Z">
        Redo
      </button>
    </div>
  );
}

function sayKept(kept: boolean): string {
  return kept ? "; kept in this browser" : ", and this browser keeps nothing: save before you leave";
}
