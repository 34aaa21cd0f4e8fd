import { effect, type ReadonlySignal, useSignal } from "@preact/signals";
import { useEffect, useRef } from "preact/hooks";
import type { CurvePicture } from "./curve-picture.ts";
import type { LevelChart } from "./level-chart.ts";
import { whenNear } from "./when-near.ts";
import "./curve-canvas.css";

interface CurveCanvasProps {
  readonly picture: ReadonlySignal<CurvePicture | undefined>;
  /** What the picture shows, for those who cannot see it; the numbers are in a table elsewhere. */
  readonly label: string;
}

/** A canvas that always shows the newest picture. The chart library is loaded when one is about to be seen. */
export function CurveCanvas({ picture, label }: CurveCanvasProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const failed = useSignal(false);
  useEffect(() => {
    const drawn = canvas.current;
    if (drawn === null) return;
    let chart: LevelChart | undefined;
    let stop: (() => void) | undefined;
    let gone = false;
    const draw = async () => {
      try {
        const { createLevelChart } = await import("./level-chart.ts");
        if (gone) return;
        const made = createLevelChart(drawn);
        chart = made;
        stop = effect(() => {
          if (picture.value !== undefined) made.draw(picture.value);
        });
      } catch {
        failed.value = true;
      }
    };
    const wait = whenNear(drawn, () => void draw());
    return () => {
      gone = true;
      wait();
      stop?.();
      chart?.destroy();
    };
  }, [picture]);
  return (
    <div class="curve-canvas">
      <canvas ref={canvas} role="img" aria-label={label} />
      {failed.value && (
        <p class="curve-failed" role="alert">
          The picture could not be loaded. The table below holds the same levels; to try again, load the page anew: what
          is typed is kept.
        </p>
      )}
    </div>
  );
}
