import { useEffect, useMemo, useRef } from "preact/hooks";
import type { CaseModel } from "../case/case-model.ts";
import { CursorControl } from "./cursor-control.tsx";
import { CursorLine } from "./cursor-line.tsx";
import { CursorTime } from "./cursor-time.tsx";
import { CurveCanvas } from "./curve-canvas.tsx";
import { CurveTools } from "./curve-tools.tsx";
import { type CurveView, createCurveView } from "./curve-view.ts";
import { DoseEditor } from "./dose-editor.tsx";
import { DoseInWords } from "./dose-in-words.tsx";
import { LevelTable } from "./level-table.tsx";
import { gutters, hourAt } from "./plot-scale.ts";
import { Readout } from "./readout.tsx";
import { Ruler } from "./ruler.tsx";
import { RulerKey } from "./ruler-key.tsx";
import { TickRow } from "./tick-row.tsx";
import { usePlotWidth } from "./use-plot-width.ts";
import "./curve-section.css";

/** Curves of all alternatives above a ruler of real clock time, on one axis. */
export function CurveSection({ model }: { model: CaseModel }) {
  const view = useMemo(() => createCurveView(model), [model]);
  const computable = view.span.value !== undefined && view.keys.value !== "";
  return (
    <section class="part" aria-labelledby="curve-title">
      <h2 id="curve-title">Levels over time, and the doses</h2>
      {computable ? (
        <>
          <Readout view={view} />
          <CurveTools view={view} />
          <Stage view={view} />
          <DoseInWords view={view} />
          <RulerKey />
          <DoseEditor view={view} />
          <CursorTime view={view} />
          <LevelTable view={view} />
        </>
      ) : (
        <p class="soft">
          The curves appear here once the plan and the kinetics are stated and the case has an alternative with doses to
          predict.
        </p>
      )}
    </section>
  );
}

/** Chart, clock and ruler, one above the other, with the cursor through all of them. */
function Stage({ view }: { view: CurveView }) {
  const stage = useRef<HTMLDivElement>(null);
  usePlotWidth(stage, view.plotPx);
  useWheel(view, stage);
  return (
    <div class="curve-stage" ref={stage}>
      <p class="axis-name">Level, mg/L</p>
      <div class="curve-plot">
        <CurveCanvas
          picture={view.picture}
          label="Curves of the levels of all alternatives; the table below holds the numbers"
        />
        <CursorControl view={view} />
      </div>
      <TickRow view={view} />
      <Ruler view={view} />
      <CursorLine view={view} />
    </div>
  );
}

/** Ctrl with the wheel zooms about the pointer; a wheel that turns sideways moves the window. */
function useWheel(view: CurveView, stage: { readonly current: HTMLDivElement | null }): void {
  useEffect(() => {
    const element = stage.current;
    if (element === null) return;
    const turned = (event: WheelEvent) => {
      const now = view.window.peek();
      const plotPx = view.plotPx.peek();
      if (event.ctrlKey) {
        event.preventDefault();
        const xPx = event.clientX - element.getBoundingClientRect().left - gutters.leftPx;
        view.zoom(Math.exp(event.deltaY / 300), hourAt(xPx, now, plotPx));
      } else if (Math.abs(event.deltaX) > Math.abs(event.deltaY) || event.shiftKey) {
        event.preventDefault();
        view.pan(((event.deltaX || event.deltaY) / plotPx) * (now.toH - now.fromH));
      }
    };
    // Not passive, or the browser would zoom the whole page as well.
    element.addEventListener("wheel", turned, { passive: false });
    return () => element.removeEventListener("wheel", turned);
  }, [view, stage]);
}
