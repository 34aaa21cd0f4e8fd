import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { markPx } from "./mark-layout.ts";

interface LaneBarsProps {
  readonly marks: readonly { readonly dose: ScheduledDose; readonly xPx: number; readonly row: number }[];
  readonly pixelOf: (atH: number) => number;
  readonly plotPx: number;
  readonly rows: number;
}

/** How long each dose runs, and where a dose that was given otherwise had been planned. */
export function LaneBars({ marks, pixelOf, plotPx, rows }: LaneBarsProps) {
  return (
    <svg class="lane-bars" width={plotPx} height={rows * markPx} aria-hidden="true">
      {marks.map(({ dose, row }) => {
        const y = (row + 0.5) * markPx;
        const fromPx = Math.max(0, pixelOf(dose.atH));
        const toPx = Math.min(plotPx, pixelOf(dose.atH + lengthH(dose)));
        const planned =
          dose.plannedAtH !== undefined && dose.status === "changed" && dose.plannedAtH !== dose.atH
            ? pixelOf(dose.plannedAtH)
            : undefined;
        return (
          <g key={dose.key}>
            {toPx > fromPx && (
              <rect
                class={dose.status === "omitted" ? "run run-omitted" : "run"}
                x={fromPx}
                y={y - 4}
                width={toPx - fromPx}
                height="8"
              />
            )}
            {planned !== undefined && planned >= 0 && planned <= plotPx && (
              <path class="was-planned" d={`M${planned} ${y - 9} V${y + 9} M${planned} ${y} H${pixelOf(dose.atH)}`} />
            )}
          </g>
        );
      })}
    </svg>
  );
}

function lengthH({ give }: ScheduledDose): number {
  if (give.kind === "infusion") return give.durationH;
  return give.kind === "pump" ? give.steps.at(-1)!.afterH : 0;
}
