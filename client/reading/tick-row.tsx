import { useMemo, useRef } from "preact/hooks";
import { ClockAxis } from "./clock-axis.tsx";
import type { CurveView } from "./curve-view.ts";
import { frameOnce } from "./frame-once.ts";

/** Clock times and dates between chart and ruler; dragging them moves the window. */
export function TickRow({ view }: { view: CurveView }) {
  const lastPx = useRef(0);
  const pan = useMemo(
    () =>
      frameOnce((toPx: number) => {
        const { fromH, toH } = view.window.peek();
        view.pan(((lastPx.current - toPx) / view.plotPx.peek()) * (toH - fromH));
        lastPx.current = toPx;
      }),
    [view],
  );
  return (
    <div
      class="tick-row"
      onPointerDown={(event) => {
        lastPx.current = event.clientX;
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={(event) => {
        if (event.currentTarget.hasPointerCapture(event.pointerId)) pan(event.clientX);
      }}
    >
      <ClockAxis window={view.window.value} plotPx={view.plotPx.value} ticks={view.ticks.value} />
    </div>
  );
}
