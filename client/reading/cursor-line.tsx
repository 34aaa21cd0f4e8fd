import type { CurveView } from "./curve-view.ts";
import { gutters, pixelAt } from "./plot-scale.ts";

/** The cursor through chart, clock and ruler. It has its own element, so that moving it redraws no curve. */
export function CursorLine({ view }: { view: CurveView }) {
  const xPx = pixelAt(view.cursorH.value, view.window.value, view.plotPx.value);
  if (xPx < 0 || xPx > view.plotPx.value) return null;
  return <div class="cursor-line" aria-hidden="true" style={{ transform: `translateX(${gutters.leftPx + xPx}px)` }} />;
}
