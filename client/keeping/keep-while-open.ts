import { type Signal, effect } from "@preact/signals";
import { type CasePage, hasUnsaved } from "../case/case-page.ts";
import { dropKept, keptName, writeKept } from "./kept-text.ts";
import { writeUnsaved } from "./write-unsaved.ts";

/** Long enough not to write at every key, short enough that a crash loses a word at most. */
const pauseMs = 400;

/**
 * Keeps what is typed in the browser: shortly after every change, and at once when the page is hidden or
 * left. What the server has is dropped.
 *
 * @param kept set to whether the browser could keep it
 * @returns    ends the keeping, after a last write
 */
export function keepWhileOpen(page: CasePage, kept: Signal<boolean>): () => void {
  const name = keptName(page.stored.peek().case.id);
  let timer: number | undefined;
  const keep = () => {
    clearTimeout(timer);
    timer = undefined;
    if (!hasUnsaved(page)) {
      dropKept(name);
      kept.value = true;
      return;
    }
    const work = { document: page.model.document.peek(), drafts: page.drafts.all.peek(), baseVersion: page.baseVersion.peek() };
    kept.value = writeKept(name, writeUnsaved(work, new Date()));
  };
  const keepIfHidden = () => {
    if (document.visibilityState === "hidden") keep();
  };
  const stop = effect(() => {
    void [page.model.document.value, page.drafts.all.value, page.baseVersion.value, page.stored.value];
    clearTimeout(timer);
    timer = setTimeout(keep, pauseMs);
  });
  addEventListener("pagehide", keep);
  document.addEventListener("visibilitychange", keepIfHidden);
  return () => {
    stop();
    keep();
    removeEventListener("pagehide", keep);
    document.removeEventListener("visibilitychange", keepIfHidden);
  };
}
