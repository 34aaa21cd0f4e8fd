import type { Signal } from "@preact/signals";
import { useLayoutEffect } from "preact/hooks";
import { gutters } from "./plot-scale.ts";

/** Keeps a signal at the width of the plot within an element: what is left between the gutters. */
export function usePlotWidth(element: { readonly current: HTMLElement | null }, plotPx: Signal<number>): void {
  useLayoutEffect(() => {
    const observed = element.current;
    if (observed === null) return;
    const measure = () => {
      plotPx.value = Math.max(1, observed.clientWidth - gutters.leftPx - gutters.rightPx);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(observed);
    return () => observer.disconnect();
  }, [element, plotPx]);
}
