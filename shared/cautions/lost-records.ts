import { recordsWithoutDose } from "../schedule/doses-given.ts";
import { plannedDoses } from "../schedule/expand-orders.ts";
import type { ContentSubject, Rule } from "./subject.ts";

/** A record of a dose that the schedule no longer has would drop out of the past without a word. */
export const lostRecords: Rule<ContentSubject> = ({ content }) =>
  recordsWithoutDose(content).map((record) => ({
    code: "record-without-dose",
    severity: "stop",
    text: `What was recorded for dose ${record.occurrence + 1} of order ${numberOf(content.schedule.orders, record.orderId)} is not in the prediction: the schedule has no such dose now. Record it as an extra dose, or take the record out.`,
    about: `/schedule/records/${content.schedule.records.indexOf(record)}`,
  }));

/** A change to a dose that the order does not have any more has no effect. */
export const idleExceptions: Rule<ContentSubject> = ({ content }) => {
  const moved = new Set(plannedDoses(content).map(({ key }) => key));
  return content.schedule.orders.flatMap((order, index) =>
    order.exceptions
      .filter((exception) => !("skip" in exception) && !moved.has(`${order.id}#${exception.occurrence}`))
      .map(({ occurrence }) => ({
        code: "edit-without-dose",
        severity: "warn" as const,
        text: `The change planned for dose ${occurrence + 1} of order ${index + 1} has no effect: the order has no such dose within the plan.`,
        about: `/schedule/orders/${index}/exceptions`,
      })),
  );
};

function numberOf(orders: readonly { readonly id: string }[], orderId: string): string {
  const index = orders.findIndex(({ id }) => id === orderId);
  return index < 0 ? "that is gone" : String(index + 1);
}
