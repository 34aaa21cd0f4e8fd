import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { ClockTicks } from "./clock-ticks.ts";
import { gutters, pixelAt } from "./plot-scale.ts";
import "./clock-axis.css";

interface ClockAxisProps {
  readonly window: TimeWindow;
  readonly plotPx: number;
  readonly ticks: ClockTicks;
}

/** The horizontal axis as text: clock times and the days or months they belong to. */
export function ClockAxis({ window, plotPx, ticks: { ticks, stretches } }: ClockAxisProps) {
  const xOf = (atH: number) => gutters.leftPx + pixelAt(atH, window, plotPx);
  return (
    <svg class="clock-axis" width={plotPx + gutters.leftPx + gutters.rightPx} height="40" aria-hidden="true">
      <line class="tick-base" x1={gutters.leftPx} x2={gutters.leftPx + plotPx} y1="0.5" y2="0.5" />
      {ticks.map(({ atH, text, weight }) => (
        <g key={atH}>
          <line class={`tick-${weight}`} x1={xOf(atH)} x2={xOf(atH)} y1="0" y2={weight === "strong" ? 8 : 5} />
          <text class={`tick-text tick-text-${weight}`} x={xOf(atH)} y="19" text-anchor="middle">
            {text}
          </text>
        </g>
      ))}
      {stretches.map(({ fromH, text }) => (
        <text key={fromH} class="tick-date" x={xOf(fromH) + 2} y="35">
          {text}
        </text>
      ))}
    </svg>
  );
}
