import { type LimitName, limits } from "../../shared/contract/limits.ts";
import type { DomainError } from "../../shared/errors.ts";
import { sayClock } from "../../shared/schedule/clock.ts";

/** Why something cannot be computed, as a sentence: where it stands, what is allowed, what came. */
export function sayRefusal(error: DomainError, timeZone: string): string {
  return `${sayPath(error.field)} ${sayAllowed(error, timeZone)}`;
}

/** The part of the sentence after the place, with instants read out by the clock. */
export function sayAllowed({ allowed, value }: DomainError, timeZone: string): string {
  const got = value === undefined ? "" : `, got ${String(value)}`;
  return `must be ${allowed}${got}`.replace(/\d{4}-\d\d-\d\dT[\d:.]+(?:Z|[+-]\d\d:\d\d)/g, (instant) =>
    sayClock(instant, timeZone),
  );
}

/** "schedule/orders/0/when/from" -> "order 1, when, from"; a quantity by its name. */
export function sayPath(field: string): string {
  const last = field.split("/").at(-1) ?? "";
  if (Object.hasOwn(limits, last)) return limits[last as LimitName].label.toLowerCase();
  return field
    .replace(/^(schedule|setting)\//, "")
    .replace(/orders\/(\d+)/, (_, index: string) => `order ${Number(index) + 1}`)
    .replace(/extras\/(\d+)/, (_, index: string) => `extra dose ${Number(index) + 1}`)
    .replace(/eliminationChanges\/(\d+)/, (_, index: string) => `change of elimination ${Number(index) + 1}`)
    .replace(/records\/(\d+)/, (_, index: string) => `what was given, record ${Number(index) + 1}`)
    .replaceAll("/", ", ");
}
