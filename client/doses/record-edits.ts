import type { Schedule } from "../../shared/contract/case.ts";
import type { ExtraDose } from "../../shared/contract/schedule.ts";
import { withException } from "../orders/order-edits.ts";
import type { DoseEdit, OrderedDose } from "./dose-draft.ts";

/** The schedule with what the editor of one dose says about its plan and about what was given. */
export function withDoseEdit(
  schedule: Schedule,
  { orderId, occurrence }: Pick<OrderedDose, "orderId" | "occurrence">,
  edit: DoseEdit,
): Schedule {
  const planned = withException(schedule, orderId, occurrence, edit.exception);
  const others = withoutRecord(planned, orderId, occurrence).records;
  return { ...planned, records: edit.record === undefined ? others : [...others, edit.record] };
}

/** The schedule without what was recorded about one dose. */
export function withoutRecord(schedule: Schedule, orderId: string, occurrence: number): Schedule {
  const records = schedule.records.filter((record) => record.orderId !== orderId || record.occurrence !== occurrence);
  return { ...schedule, records };
}

/** The schedule with an extra dose replaced, or added at the end where it is new. */
export function withExtra(schedule: Schedule, extra: ExtraDose): Schedule {
  const known = schedule.extras.some(({ id }) => id === extra.id);
  return {
    ...schedule,
    extras: known ? schedule.extras.map((each) => (each.id === extra.id ? extra : each)) : [...schedule.extras, extra],
  };
}

export function withoutExtra(schedule: Schedule, id: string): Schedule {
  return { ...schedule, extras: schedule.extras.filter((extra) => extra.id !== id) };
}
