import type { Instant } from "../../shared/contract/schedule.ts";
import type { Prepared } from "../../shared/figures/prepared.ts";
import { walk } from "../../shared/kinetics/walk.ts";
import { elapsedDose } from "../../shared/schedule/elapsed-dose.ts";
import { inTimeOrder, type ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import type { Prediction } from "./predictions.ts";

/** Where a dose is moved to. */
export interface Moved {
  readonly doseKey: string;
  readonly at: Instant;
  readonly atH: number;
}

/**
 * A prediction with one dose at another time, without expanding the orders anew: turning some hundred
 * clock times into instants costs a frame, walking through them does not. The steady state is that of
 * the orders, which a moved dose leaves as it is.
 */
export function movedPrediction(prediction: Prediction, moved: Moved): Prediction {
  if (!prediction.ok) return prediction;
  const { given, planned, doses } = prediction;
  const dose = doses.find(({ key }) => key === moved.doseKey);
  // What was recorded is given at another time; its place in the plan stays.
  const inPlan = dose?.status === "planned";
  return {
    ok: true,
    given: movedPrepared(given, moved),
    ...(planned !== undefined && { planned: inPlan ? movedPrepared(planned, moved) : planned }),
    doses: inTimeOrder(doses.map((each) => (each.key === moved.doseKey ? movedDose(each, moved, given) : each))),
  };
}

function movedPrepared(prepared: Prepared, moved: Moved): Prepared {
  const doses = inTimeOrder(
    prepared.doses.map((dose) => (dose.key === moved.doseKey ? movedDose(dose, moved, prepared) : dose)),
  );
  const lagH = prepared.content.setting.kinetics.lagH?.value ?? 0;
  const course = { ...prepared.course, doses: doses.map(({ give, atH }) => elapsedDose(give, atH, lagH)) };
  return { ...prepared, doses, course, made: walk(course) };
}

function movedDose(dose: ScheduledDose, { at, atH }: Moved, { content }: Prepared): ScheduledDose {
  const order = content.schedule.orders.find(({ id }) => id === dose.orderId);
  if (dose.status === "planned")
    return { ...dose, at, atH, plannedAt: at, plannedAtH: atH, edited: order?.when.kind !== "once" };
  return { ...dose, at, atH, ...(dose.status === "as-planned" && { status: "changed" }) };
}
