import type { Schedule } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { sayGiven } from "../../shared/schedule/say-order.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

/** What a dose is called, whatever time it is moved to: "dose 3", "dose 3 of order 2", "order 1", "extra dose". */
export function nameOfDose(dose: ScheduledDose, { orders }: Schedule): string {
  if (dose.orderId === undefined) return "extra dose";
  const index = orders.findIndex(({ id }) => id === dose.orderId);
  if (orders[index]?.when.kind === "once")
    return orders.length === 1 ? "single dose" : `single dose of order ${index + 1}`;
  const number = `dose ${(dose.occurrence ?? 0) + 1}`;
  return orders.length === 1 ? number : `${number} of order ${index + 1}`;
}

/** What became of a dose, in words. */
export function sayStatus(dose: ScheduledDose, timeZone: string): string {
  if (dose.status === "planned") return dose.edited ? "planned, other than the rest of its order" : "planned";
  if (dose.status === "as-planned") return "given as planned";
  if (dose.status === "omitted") return "omitted";
  if (dose.status === "extra") return "extra";
  return dose.plannedAt === undefined
    ? "given otherwise"
    : `given otherwise, planned ${sayClock(dose.plannedAt, timeZone)}`;
}

const said = new WeakMap<ScheduledDose, string>();

/**
 * A dose in one line: "Dose 3, 500 mg over 1 h, Mon 2 Mar 2026 08:00, planned". Remembered by the dose, which
 * is made anew whenever its schedule is: a hundred dates in words a frame would be felt.
 */
export function sayDose(dose: ScheduledDose, schedule: Schedule, timeZone: string): string {
  const known = said.get(dose);
  if (known !== undefined) return known;
  const parts = [
    nameOfDose(dose, schedule),
    sayGiven(dose.give),
    sayClock(dose.at, timeZone),
    sayStatus(dose, timeZone),
  ];
  const words = capital(parts.join(", "));
  said.set(dose, words);
  return words;
}

/** The text as a sentence begins. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
