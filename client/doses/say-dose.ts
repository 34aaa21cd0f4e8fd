import { sayClock } from "../../shared/schedule/clock.ts";
import { sayGive } from "../../shared/schedule/say-order.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { same } from "../case/same.ts";

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
