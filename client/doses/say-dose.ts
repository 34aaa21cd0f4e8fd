import type { Order } from "../../shared/contract/schedule.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { same } from "../case/same.ts";
import { sayGive } from "../orders/say-order.ts";

/** What a dose is called: "order 2, dose 5". */
export function nameOfDose({ orderId, occurrence }: Pick<ScheduledDose, "orderId" | "occurrence">, orders: readonly Order[]): string {
  if (orderId === undefined || occurrence === undefined) return "extra dose";
  const index = orders.findIndex(({ id }) => id === orderId);
  return `${index < 0 ? "an order that is gone" : `order ${index + 1}`}, dose ${occurrence + 1}`;
}

/** What became of a dose, in words; only what differs from the plan is repeated. */
export function sayOutcome(dose: ScheduledDose, timeZone: string): string {
  if (dose.status === "planned") return "nothing recorded";
  if (dose.status === "as-planned") return "given as planned";
  if (dose.status === "omitted") return "omitted";
  if (dose.status === "extra") return "extra dose, not planned";
  const moved = dose.plannedAt !== undefined && Date.parse(dose.plannedAt) !== Date.parse(dose.at);
  const parts = [moved && sayClock(dose.at, timeZone), !same(dose.give, dose.plannedGive) && sayGive(dose.give)];
  return `given otherwise: ${parts.filter(Boolean).join(", ")}`;
}
