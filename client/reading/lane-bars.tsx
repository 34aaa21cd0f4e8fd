import { useComputed } from "@preact/signals";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import type { DoseHand } from "./dose-hand.ts";
import { markPx } from "./mark-layout.ts";

interface LaneBarsProps {
  readonly doses: readonly ScheduledDose[];
  readonly marks: readonly { readonly dose: ScheduledDose; readonly xPx: number; readonly row: number }[];
  readonly pixelOf: (atH: number) => number;
  readonly plotPx: number;
  readonly rows: number;
  /** What may hold one of the doses. */
  readonly hand?: DoseHand;
}

/** How long each dose runs, and where a dose that was given otherwise had been planned. */
export function LaneBars({ doses, marks, pixelOf, plotPx, rows, hand }: LaneBarsProps) {
  // What began before the part in view has no mark there, but may still run.
  const running = doses.filter((dose) => pixelOf(dose.atH) < 0 && pixelOf(dose.atH + lengthH(dose)) > 0);
  const bars = [...running.map((dose) => ({ dose, row: 0 })), ...marks.filter(({ dose }) => !running.includes(dose))];
  return (
    <svg class="lane-bars" width={plotPx} height={rows * markPx} aria-hidden="true">
      {bars.map(({ dose, row }) => (
        <Bar key={dose.key} dose={dose} y={(row + 0.5) * markPx} pixelOf={pixelOf} plotPx={plotPx} hand={hand} />
      ))}
    </svg>
  );
}

interface BarProps {
  readonly dose: ScheduledDose;
  readonly y: number;
  readonly pixelOf: (atH: number) => number;
  readonly plotPx: number;
  readonly hand: DoseHand | undefined;
}

function Bar({ dose: written, y, pixelOf, plotPx, hand }: BarProps) {
  const dose = useComputed(() => hand?.inHand(written.key)).value ?? written;
  const fromPx = Math.max(0, pixelOf(dose.atH));
  const toPx = Math.min(plotPx, pixelOf(dose.atH + lengthH(dose)));
  const { plannedAtH } = dose;
  const moved = dose.status === "changed" && plannedAtH !== undefined && plannedAtH !== dose.atH;
  const plannedPx = moved ? pixelOf(plannedAtH) : -1;
  return (
    <g>
      {toPx > fromPx && (
        <rect
          class={dose.status === "omitted" ? "run run-omitted" : "run"}
          x={fromPx}
          y={y - 4}
          width={toPx - fromPx}
          height="8"
        />
      )}
      {plannedPx >= 0 && plannedPx <= plotPx && (
        <path class="was-planned" d={`M${plannedPx} ${y - 9} V${y + 9} M${plannedPx} ${y} H${pixelOf(dose.atH)}`} />
      )}
    </g>
  );
}

function lengthH({ give }: ScheduledDose): number {
  if (give.kind === "infusion") return give.durationH;
  return give.kind === "pump" ? give.steps.at(-1)!.afterH : 0;
}
