import { useMemo } from "preact/hooks";
import { sayCursor } from "./cursor-words.ts";
import { type CurveView, followCursor } from "./curve-view.ts";
import { frameOnce } from "./frame-once.ts";
import { gutters, hourAt } from "./plot-scale.ts";
import { steppedH } from "./snap.ts";
import { useSettled } from "./use-settled.ts";

const dayH = 24;

/**
 * The plot as a slider: a press or drag puts the cursor there, keys move it, and what it reads out is the
 * slider's value in words, so that a screen reader says it with every step.
 */
export function CursorControl({ view }: { view: CurveView }) {
  const { span, cursorH } = view;
  // Nobody listens to the levels while a dose is in the hand.
  const settled = useSettled(view.contents);
  const follow = useMemo(() => frameOnce((atH: number) => view.moveCursor(atH)), [view]);
  const hourOf = (event: PointerEvent & { readonly currentTarget: HTMLElement }) =>
    hourAt(event.clientX - event.currentTarget.getBoundingClientRect().left, view.window.peek(), view.plotPx.peek());
  const pressed = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (!act(view, event)) return;
    event.preventDefault();
    followCursor(view);
  };
  return (
    <div
      class="cursor-control"
      role="slider"
      tabIndex={0}
      aria-label="Cursor: time at which the levels are read out"
      aria-describedby="curve-keys"
      aria-orientation="horizontal"
      aria-valuemin={0}
      aria-valuemax={span.value?.horizonH ?? 0}
      aria-valuenow={cursorH.value}
      aria-valuetext={sayCursor(view, settled.value)}
      style={{ left: `${gutters.leftPx}px`, right: `${gutters.rightPx}px` }}
      onKeyDown={pressed}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        follow(hourOf(event));
      }}
      onPointerMove={(event) => {
        if (event.currentTarget.hasPointerCapture(event.pointerId)) follow(hourOf(event));
      }}
    />
  );
}

/** Whether the key meant something here. */
function act(view: CurveView, { key, shiftKey }: KeyboardEvent): boolean {
  const span = view.span.peek();
  if (span === undefined) return false;
  const now = view.cursorH.peek();
  const step = (direction: -1 | 1) => steppedH(now, direction, view.snap.peek(), shiftKey ? "larger" : "usual", span);
  if (key === "ArrowRight" || key === "ArrowUp") view.moveCursor(step(1));
  else if (key === "ArrowLeft" || key === "ArrowDown") view.moveCursor(step(-1));
  else if (key === "PageUp") view.moveCursor(now + dayH);
  else if (key === "PageDown") view.moveCursor(now - dayH);
  else if (key === "Home") view.moveCursor(0);
  else if (key === "End") view.moveCursor(span.horizonH);
  else if (key === "+" || key === "=") view.zoom(0.5);
  else if (key === "-") view.zoom(2);
  else if (key === "0") view.show(undefined);
  else return false;
  return true;
}
