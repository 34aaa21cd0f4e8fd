import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import type { AlternativeLook } from "./alternative-look.ts";
import type { CurveView } from "./curve-view.ts";
import { DoseGlyph } from "./dose-glyph.tsx";
import { LaneBars } from "./lane-bars.tsx";
import { inkOf } from "./line-sample.tsx";
import { markPx, placeMarks, placeOf } from "./mark-layout.ts";
import { pixelAt } from "./plot-scale.ts";

interface PlainLaneProps {
  readonly view: CurveView;
  readonly look: AlternativeLook;
  readonly doses: readonly ScheduledDose[];
}

/** The doses of an alternative that is not being edited: seen, not touched. */
export function PlainLane({ view, look, doses }: PlainLaneProps) {
  const plotPx = view.plotPx.value;
  const pixelOf = (atH: number) => pixelAt(atH, view.window.value, plotPx);
  const placed = placeMarks(doses, pixelOf, plotPx);
  const single = placed.filter((mark) => mark.kind === "dose");
  const rows = 1 + Math.max(0, ...placed.map(({ row }) => row));
  const inView = doses.filter(({ atH }) => pixelOf(atH) >= 0 && pixelOf(atH) <= plotPx).length;
  return (
    <div class={`lane-body ${inkOf(look)}`} style={{ width: `${plotPx}px`, height: `${rows * markPx}px` }}>
      <span class="unseen">
        {inView} {inView === 1 ? "dose" : "doses"} in view
      </span>
      <LaneBars doses={doses} marks={single} pixelOf={pixelOf} plotPx={plotPx} rows={rows} />
      {placed.map((mark) => (
        <span
          key={mark.kind === "dose" ? mark.dose.key : `bunch ${mark.doses[0]!.key}`}
          class={mark.kind === "dose" ? "mark-place" : "mark-place mark-bunch"}
          aria-hidden="true"
          style={placeOf(mark)}
        >
          {mark.kind === "dose" ? (
            <DoseGlyph kind={mark.dose.give.kind} status={mark.dose.status} />
          ) : (
            mark.doses.length
          )}
        </span>
      ))}
    </div>
  );
}
