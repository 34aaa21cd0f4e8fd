import { instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { formatHours, formatLevel } from "../../shared/units/format.ts";
import { lookAt } from "./alternative-look.ts";
import type { CurveView } from "./curve-view.ts";
import { levelAt, predictionOf } from "./predictions.ts";

/** Clock time and elapsed hours of an hour of the plan: "Mon 2 Mar 2026 08:00, 0 h into the plan". */
export function sayHour(
  atH: number,
  { start, timeZone }: { readonly start: string; readonly timeZone: string },
): string {
  return `${sayClock(instantAt(start, atH, timeZone), timeZone)}, ${formatHours(atH)} into the plan`;
}

/** The level of every alternative at the cursor, in one sentence for the ear. */
export function sayCursor(view: CurveView, contents = view.contents.value): string {
  const span = view.span.value;
  if (span === undefined) return "";
  const atH = view.cursorH.value;
  const levels = [...contents.values()].map((content, place) => {
    const prediction = predictionOf(content);
    return `${lookAt(place).letter} ${prediction.ok ? formatLevel(levelAt(prediction.given, atH)) : "cannot be computed"}`;
  });
  return [sayClock(instantAt(span.start, atH, span.timeZone), span.timeZone), ...levels].join(", ");
}
