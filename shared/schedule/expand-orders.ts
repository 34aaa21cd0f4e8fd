import type { RegimenContent } from "../contract/case.ts";
import { counts } from "../contract/limits.ts";
import type { Order } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";
import { changedGive } from "./changed-give.ts";
import { hoursBetween } from "./clock.ts";
import { type DueTime, dueTimes, type PlanSpan } from "./order-times.ts";
import { inTimeOrder, type ScheduledDose } from "./scheduled-dose.ts";

/**
 * Every dose that the orders of a schedule plan, exceptions carried out, in the order of time.
 *
 * @throws {DomainError} naming the order, if a dose stands before the plan or there are too many
 */
export function plannedDoses(content: RegimenContent): ScheduledDose[] {
  const span = spanOf(content);
  const doses = content.schedule.orders.flatMap((order, index) => dosesOf(order, span, `schedule/orders/${index}`));
  if (doses.length > counts.doses)
    throw new DomainError("schedule/orders", `${doses.length} doses`, `at most ${counts.doses} doses in all`);
  return inTimeOrder(doses);
}

/** The plan's span in clock time. */
export function spanOf(content: RegimenContent): PlanSpan {
  return { ...content.setting.plan, timeZone: content.timeZone };
}

function dosesOf(order: Order, span: PlanSpan, field: string): ScheduledDose[] {
  const exceptions = new Map(order.exceptions.map((exception, index) => [exception.occurrence, { exception, index }]));
  return dueTimes(order, span, field).flatMap((due) => {
    const found = exceptions.get(due.occurrence);
    return found === undefined
      ? [doseAt(order, due, span)]
      : exceptional(order, due, span, found.exception, `${field}/exceptions/${found.index}`);
  });
}

function exceptional(
  order: Order,
  due: DueTime,
  span: PlanSpan,
  exception: Order["exceptions"][number],
  field: string,
): ScheduledDose[] {
  if ("skip" in exception) return [];
  const usual = doseAt(order, due, span);
  const give = changedGive(usual.give, exception, field);
  const at = exception.at ?? usual.at;
  const atH = hoursFromStart(at, span, `${field}/at`);
  return [{ ...usual, give, at, atH, plannedAt: at, plannedAtH: atH, plannedGive: give, edited: true }];
}

function doseAt(order: Order, due: DueTime, span: PlanSpan): ScheduledDose {
  const { amountMg } = due;
  const give = amountMg === undefined ? order.give : changedGive(order.give, { amountMg }, "when/times");
  const atH = hoursBetween(span.start, due.at);
  return {
    key: `${order.id}#${due.occurrence}`,
    orderId: order.id,
    occurrence: due.occurrence,
    give,
    plannedAt: due.at,
    plannedAtH: atH,
    plannedGive: give,
    at: due.at,
    atH,
    status: "planned",
    edited: false,
  };
}

/**
 * Elapsed hours of an instant that must not lie before the plan.
 *
 * @throws {DomainError} if it does
 */
export function hoursFromStart(at: string, span: PlanSpan, field: string): number {
  const atH = hoursBetween(span.start, at);
  if (!(atH >= 0)) throw new DomainError(field, at, `at or after the start of the plan (${span.start})`);
  return atH;
}
