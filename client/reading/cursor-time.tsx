import { useSignal } from "@preact/signals";
import { hoursBetween, instantAt } from "../../shared/schedule/clock.ts";
import { type MomentText, momentText, readMoment } from "../controls/moment.ts";
import { MomentField } from "../controls/moment-field.tsx";
import { announce } from "../shell/announce.ts";
import { sayCursor } from "./cursor-words.ts";
import { type CurveView, followCursor } from "./curve-view.ts";

/** The cursor's time, typed. It is taken when the field is left or Enter is pressed. */
export function CursorTime({ view }: { view: CurveView }) {
  const typed = useSignal<MomentText | undefined>(undefined);
  const span = view.span.value;
  if (span === undefined) return null;
  const moment = typed.value ?? momentText(instantAt(span.start, view.cursorH.value, span.timeZone), span.timeZone);
  const read = readMoment(moment, span.timeZone, "Time of the cursor");
  const atH = read.ok ? hoursBetween(span.start, read.instant) : undefined;
  const outside = atH !== undefined && !(atH >= 0 && atH <= span.horizonH);
  return (
    <div class="cursor-time">
      <MomentField
        id="cursor-time"
        label="Time of the cursor"
        moment={moment}
        timeZone={span.timeZone}
        hint="24-hour, such as 2026-03-29 08:00; the levels at this time stand above the chart"
        problem={outside ? "Time of the cursor must be within the plan" : undefined}
        onMoment={(next, stage) => {
          typed.value = next;
          const settled = readMoment(next, span.timeZone, "");
          const nextH = settled.ok ? hoursBetween(span.start, settled.instant) : undefined;
          if (stage !== "settled" || nextH === undefined || !(nextH >= 0 && nextH <= span.horizonH)) return;
          view.moveCursor(nextH);
          followCursor(view);
          typed.value = undefined;
          announce(sayCursor(view));
        }}
      />
    </div>
  );
}
