import { effect, type Signal } from "@preact/signals";
import { type CasePage, hasUnsaved } from "../case/case-page.ts";
import { liveDrafts } from "../case/live-drafts.ts";
import { holdAlone } from "./hold-alone.ts";
import { dropKept, keptName, writeKept } from "./kept-text.ts";
import { writeUnsaved } from "./write-unsaved.ts";

/** Long enough not to write at every key, short enough that a crash loses a word at most. */
const pauseMs = 400;

/** Whether this tab's unsaved work is kept: the browser may refuse, or another tab may have the case open. */
export type Keeping = "kept" | "refused" | "other-tab";

/**
 * Keeps what is typed in the browser: shortly after every change, and at once when the page is hidden or
 * left. What the server has is dropped. A second tab of the same case keeps nothing while the first is
 * open, so that neither overwrites the other's; where nothing is kept, the browser asks before leaving.
 *
 * @param keeping told how it stands
 * @returns       ends the keeping, after a last write
 */
export function keepWhileOpen(page: CasePage, keeping: Signal<Keeping>): () => void {
  const name = keptName(page.stored.peek().case.id);
  keeping.value = "other-tab";
  let timer: ReturnType<typeof setTimeout> | undefined;
  const keep = () => {
    clearTimeout(timer);
    if (keeping.peek() !== "other-tab") keeping.value = keepNow(page, name);
  };
  const give = holdAlone(name, () => {
    keeping.value = "kept";
    keep();
  });
  const keepIfHidden = () => {
    if (document.visibilityState === "hidden") keep();
  };
  const askIfLost = (event: BeforeUnloadEvent) => {
    if (keeping.peek() !== "kept" && hasUnsaved(page)) event.preventDefault();
  };
  const stop = effect(() => {
    void [page.model.document.value, page.drafts.all.value, page.baseVersion.value, page.stored.value];
    clearTimeout(timer);
    timer = setTimeout(keep, pauseMs);
  });
  addEventListener("pagehide", keep);
  addEventListener("beforeunload", askIfLost);
  document.addEventListener("visibilitychange", keepIfHidden);
  return () => {
    stop();
    keep();
    give();
    removeEventListener("pagehide", keep);
    removeEventListener("beforeunload", askIfLost);
    document.removeEventListener("visibilitychange", keepIfHidden);
  };
}

function keepNow(page: CasePage, name: string): Keeping {
  if (!hasUnsaved(page)) {
    dropKept(name);
    return "kept";
  }
  const document = page.model.document.peek();
  const drafts = liveDrafts(page.drafts.all.peek(), document);
  const work = { document, drafts, baseVersion: page.baseVersion.peek() };
  return writeKept(name, writeUnsaved(work, new Date())) ? "kept" : "refused";
}
