import type { Schedule } from "../../shared/contract/case.ts";
import { counts } from "../../shared/contract/limits.ts";
import type { DoseRecord, Instant, Order } from "../../shared/contract/schedule.ts";
import { DomainError } from "../../shared/errors.ts";
import { changedGive } from "../../shared/schedule/changed-give.ts";
import { type DueTime, dueTimes, type PlanSpan } from "../../shared/schedule/order-times.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

/** What one dose is to become. What is left out stays as it is. */
export interface DoseChange {
  readonly at?: Instant;
  readonly amountMg?: number;
  readonly durationH?: number;
}

type Exception = Order["exceptions"][number];

/**
 * The schedule with one dose at another time, or of another amount or duration. A dose planned for once
 * and an extra dose are changed themselves; one of a series becomes an exception of its order; one that
 * was recorded as given has its record changed, since the past is not planned anew.
 *
 * @param dose as it stands in `schedule`
 * @throws {DomainError} if the dose is recorded as omitted, has no such thing, or its order has too many exceptions
 */
export function editDose(schedule: Schedule, dose: ScheduledDose, change: DoseChange, span: PlanSpan): Schedule {
  if (dose.status === "omitted")
    throw new DomainError("dose", "an omitted one", "a dose that is given: change its record first");
  if (dose.extraId !== undefined) return withExtra(schedule, dose.extraId, change);
  if (dose.status !== "planned") return withRecord(schedule, dose, given(dose, change));
  return withOrder(schedule, dose, (order) =>
    order.when.kind === "once"
      ? {
          ...order,
          give: changedGive(dose.give, amounts(change), "dose"),
          when: { kind: "once", at: change.at ?? dose.at },
          exceptions: [],
        }
      : withException(order, dose.occurrence!, exceptionFor(order, dose, change, span)),
  );
}

/**
 * The schedule without one dose. One of a series is skipped, one planned for once goes with its order, an
 * extra dose goes; one that was recorded as given is recorded as omitted, so that the plan still shows it.
 *
 * @throws {DomainError} if its order has too many exceptions
 */
export function removeDose(schedule: Schedule, dose: ScheduledDose): Schedule {
  if (dose.extraId !== undefined)
    return { ...schedule, extras: schedule.extras.filter(({ id }) => id !== dose.extraId) };
  if (dose.status === "omitted") return schedule;
  if (dose.status !== "planned") return withRecord(schedule, dose, { kind: "omitted" });
  const order = schedule.orders.find(({ id }) => id === dose.orderId);
  if (order?.when.kind === "once") return { ...schedule, orders: schedule.orders.filter((each) => each !== order) };
  const occurrence = dose.occurrence!;
  return withOrder(schedule, dose, (each) => withException(each, occurrence, { occurrence, skip: true }));
}

function withExtra(schedule: Schedule, id: string, change: DoseChange): Schedule {
  const extras = schedule.extras.map((extra) =>
    extra.id === id
      ? { ...extra, at: change.at ?? extra.at, give: changedGive(extra.give, amounts(change), "dose") }
      : extra,
  );
  return { ...schedule, extras };
}

function withRecord(schedule: Schedule, dose: ScheduledDose, outcome: DoseRecord["outcome"]): Schedule {
  const records = schedule.records.map((record) =>
    record.orderId === dose.orderId && record.occurrence === dose.occurrence ? { ...record, outcome } : record,
  );
  return { ...schedule, records };
}

/** What was given otherwise than planned; nothing of the kind means as planned. */
function given(dose: ScheduledDose, change: DoseChange): DoseRecord["outcome"] {
  const give = changedGive(dose.give, amounts(change), "dose");
  const different = differences(dose.plannedAt!, dose.plannedGive!, change.at ?? dose.at, give);
  return Object.keys(different).length === 0 ? { kind: "as-planned" } : { kind: "changed", ...different };
}

/** The exception that says how this dose differs from the rest of its order; undefined where it does not. */
function exceptionFor(order: Order, dose: ScheduledDose, change: DoseChange, span: PlanSpan): Exception | undefined {
  const occurrence = dose.occurrence!;
  const due: DueTime | undefined = dueTimes(order, span, "order")[occurrence];
  if (due === undefined) throw new DomainError("dose", `dose ${occurrence + 1}`, "one of its order");
  const usual = changedGive(order.give, due.amountMg === undefined ? {} : { amountMg: due.amountMg }, "dose");
  const give = changedGive(dose.give, amounts(change), "dose");
  const different = differences(due.at, usual, change.at ?? dose.at, give);
  return Object.keys(different).length === 0 ? undefined : { occurrence, ...different };
}

function differences(usualAt: Instant, usual: Order["give"], at: Instant, give: Order["give"]): DoseChange {
  const amountMg =
    "amountMg" in give && "amountMg" in usual && give.amountMg !== usual.amountMg ? give.amountMg : undefined;
  const durationH =
    "durationH" in give && "durationH" in usual && give.durationH !== usual.durationH ? give.durationH : undefined;
  return {
    ...(Date.parse(at) !== Date.parse(usualAt) && { at }),
    ...(amountMg !== undefined && { amountMg }),
    ...(durationH !== undefined && { durationH }),
  };
}

function withException(order: Order, occurrence: number, exception: Exception | undefined): Order {
  const others = order.exceptions.filter((each) => each.occurrence !== occurrence);
  const exceptions =
    exception === undefined ? others : [...others, exception].sort((one, other) => one.occurrence - other.occurrence);
  if (exceptions.length > counts.exceptionsPerOrder)
    throw new DomainError(
      "order",
      `${exceptions.length} doses planned otherwise`,
      `one with at most ${counts.exceptionsPerOrder} of them`,
    );
  return { ...order, exceptions };
}

function withOrder(schedule: Schedule, dose: ScheduledDose, edit: (order: Order) => Order): Schedule {
  return { ...schedule, orders: schedule.orders.map((order) => (order.id === dose.orderId ? edit(order) : order)) };
}

function amounts({ amountMg, durationH }: DoseChange): { amountMg?: number; durationH?: number } {
  return { ...(amountMg !== undefined && { amountMg }), ...(durationH !== undefined && { durationH }) };
}
