import type { RegimenContent } from "../contract/case.ts";
import type { EliminationChange } from "../contract/dose.ts";
import type { DatedEliminationChange } from "../contract/setting.ts";
import { DomainError } from "../errors.ts";
import { hoursBetween } from "./clock.ts";
import { hoursFromStart, spanOf } from "./expand-orders.ts";

/**
 * Dated changes of elimination in elapsed hours. Those that begin after the plan's end are left out.
 *
 * @throws {DomainError} if one lies before the plan, ends before it begins, or two set elimination at one time
 */
export function elapsedElimination(content: RegimenContent): EliminationChange[] {
  const span = spanOf(content);
  const set = new Set<number>();
  return content.setting.eliminationChanges.flatMap((change, index) => {
    const field = `setting/eliminationChanges/${index}`;
    const fromH = hoursFromStart(change.from, span, `${field}/from`);
    if (change.kind !== "added-clearance" && set.has(fromH))
      throw new DomainError(
        `${field}/from`,
        change.from,
        "another time: two changes of elimination are set for this one",
      );
    if (change.kind !== "added-clearance") set.add(fromH);
    const elapsed = elapsedChange(change, fromH, field);
    return fromH < span.horizonH ? [elapsed] : [];
  });
}

function elapsedChange(change: DatedEliminationChange, fromH: number, field: string): EliminationChange {
  if (change.kind === "rate") return { fromH, eliminationRatePerH: change.eliminationRatePerH };
  if (change.kind === "clearance") return { fromH, clearanceLPerH: change.clearanceLPerH };
  const lengthH = hoursBetween(change.from, change.until);
  if (!(lengthH > 0))
    throw new DomainError(`${field}/until`, change.until, `later than the beginning of the span (${change.from})`);
  return { fromH, toH: fromH + lengthH, addedClearanceLPerH: change.addedClearanceLPerH };
}
