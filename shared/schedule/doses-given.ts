import type { RegimenContent } from "../contract/case.ts";
import type { DoseRecord } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";
import { changedGive } from "./changed-give.ts";
import { hoursFromStart, plannedDoses, spanOf } from "./expand-orders.ts";
import type { PlanSpan } from "./order-times.ts";
import { inTimeOrder, type ScheduledDose } from "./scheduled-dose.ts";

/**
 * What was given where it is known, and what is planned where it is not yet: a dose without a record
 * counts as given as planned. Omitted doses are in the list, marked so.
 *
 * @throws {DomainError} if a record or an extra dose stands before the plan, or one dose has two records
 */
export function givenDoses(content: RegimenContent): ScheduledDose[] {
  const span = spanOf(content);
  const records = new Map<string, { record: DoseRecord; field: string }>();
  content.schedule.records.forEach((record, index) => {
    const key = `${record.orderId}#${record.occurrence}`;
    const field = `schedule/records/${index}`;
    if (records.has(key))
      throw new DomainError(field, `dose ${record.occurrence + 1}`, "the only record of its dose: this one has two");
    records.set(key, { record, field });
  });
  const scheduled = plannedDoses(content).map((dose) => {
    const found = records.get(dose.key);
    return found === undefined ? dose : recorded(dose, found.record, span, found.field);
  });
  return inTimeOrder([...scheduled, ...extraDoses(content, span)]);
}

/** Records of doses that the schedule does not have: what they say would be lost without a word. */
export function recordsWithoutDose(content: RegimenContent): DoseRecord[] {
  const planned = new Set(plannedDoses(content).map(({ key }) => key));
  return content.schedule.records.filter(({ orderId, occurrence }) => !planned.has(`${orderId}#${occurrence}`));
}

function recorded(dose: ScheduledDose, { outcome }: DoseRecord, span: PlanSpan, field: string): ScheduledDose {
  if (outcome.kind !== "changed") return { ...dose, status: outcome.kind };
  const at = outcome.at ?? dose.at;
  const give = changedGive(dose.give, outcome, `${field}/outcome`);
  return { ...dose, at, atH: hoursFromStart(at, span, `${field}/outcome/at`), give, status: "changed" };
}

function extraDoses(content: RegimenContent, span: PlanSpan): ScheduledDose[] {
  return content.schedule.extras.map(({ id, at, give }, index) => ({
    key: `extra:${id}`,
    extraId: id,
    give,
    at,
    atH: hoursFromStart(at, span, `schedule/extras/${index}/at`),
    status: "extra",
    edited: false,
  }));
}
