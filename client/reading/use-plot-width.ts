import type { Signal } from "@preact/signals";
import { useLayoutEffect } from "preact/hooks";
import { gutters } from "./plot-scale.ts";

/** As wide as the narrower of A4 and US Letter leaves between usual margins, at 96 pixels an inch. */
const paperPx = 660;

/** Keeps a signal at the width of the plot within an element: what is left between the gutters. For a print it takes the width of paper. */
export function usePlotWidth(element: { readonly current: HTMLElement | null }, plotPx: Signal<number>): void {
  useLayoutEffect(() => {
    const observed = element.current;
    if (observed === null) return;
    const measure = () => {
      plotPx.value = Math.max(1, observed.clientWidth - gutters.leftPx - gutters.rightPx);
    };
    measure();
    const take = (width: string) => () => {
      observed.style.width = width;
      measure();
    };
    const [toPaper, toScreen] = [take(`${paperPx}px`), take("")];
    const observer = new ResizeObserver(measure);
    observer.observe(observed);
    addEventListener("beforeprint", toPaper);
    addEventListener("afterprint", toScreen);
    return () => {
      observer.disconnect();
      removeEventListener("beforeprint", toPaper);
      removeEventListener("afterprint", toScreen);
    };
  }, [element, plotPx]);
}
