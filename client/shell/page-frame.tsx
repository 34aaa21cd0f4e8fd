import type { ComponentChildren } from "preact";
import { useLayoutEffect, useRef } from "preact/hooks";
import type { Caution } from "../../shared/contract/caution.ts";
import { followHere } from "../routes.ts";
import { LiveRegion } from "./live-region.tsx";
import { Ribbon } from "./ribbon.tsx";
import "./page-frame.css";

interface PageFrameProps {
  readonly cautions: readonly Caution[];
  /** What the cautions are about, where the page shows more than one thing. */
  readonly about?: string | undefined;
  /** What must be known of the rest, in a line. */
  readonly elsewhere?: string | undefined;
  /** Controls that must be in reach wherever the page is scrolled to. */
  readonly tools?: ComponentChildren;
  readonly children: ComponentChildren;
}

/** What every page has: the way home, the ribbon that stays in view, one main part, the live region. */
export function PageFrame({ cautions, about, elsewhere, tools, children }: PageFrameProps) {
  const top = useRef<HTMLDivElement>(null);
  useKeepClearOf(top);
  return (
    <>
      <div class="top" ref={top}>
        <a class="skip" href="#main">
          Skip to the page
        </a>
        <header class="bar">
          <a class="brand" href="/" onClick={followHere}>
            <img src="/icon.svg" alt="" width="22" height="22" /> Ebbline
          </a>
          {tools}
        </header>
        <Ribbon cautions={cautions} about={about} elsewhere={elsewhere} />
      </div>
      <main id="main" tabIndex={-1}>
        {children}
      </main>
      <footer class="foot">
        <p>
          Ebbline predicts levels for drugs that follow one compartment with first-order elimination.{" "}
          <a href="/api/docs">The interface for programs</a>
        </p>
      </footer>
      <LiveRegion />
    </>
  );
}

/** What gets the focus must not come to stand behind the part that stays in view. */
function useKeepClearOf(top: { readonly current: HTMLDivElement | null }): void {
  useLayoutEffect(() => {
    const part = top.current;
    if (part === null) return;
    const observer = new ResizeObserver(() => {
      document.documentElement.style.scrollPaddingTop = `${part.offsetHeight + 8}px`;
    });
    observer.observe(part);
    return () => observer.disconnect();
  }, [top]);
}
