import type { Order } from "../../shared/contract/schedule.ts";
import { instantAt } from "../../shared/schedule/clock.ts";

type Dated = Pick<Order, "give" | "when">;

/**
 * A pump log given once is dated by its own first line: a log with dates, applied under another "Given at",
 * would else stand on the ruler and on the sheet where nothing runs yet.
 */
export function fromFirstLine({ give, when }: Dated, timeZone: string): Dated {
  const waitH = give.kind === "pump" ? (give.steps[0]?.afterH ?? 0) : 0;
  if (give.kind !== "pump" || when.kind !== "once" || !(waitH > 0)) return { give, when };
  // Differences of hours that came from whole seconds; a ten-millionth of an hour is less than one.
  const steps = give.steps.map(({ afterH, ...rest }) => ({ ...rest, afterH: Number((afterH - waitH).toFixed(7)) }));
  return { give: { ...give, steps }, when: { ...when, at: instantAt(when.at, waitH, timeZone) } };
}
