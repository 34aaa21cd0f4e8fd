import type { Schedule } from "../../shared/contract/case.ts";
import type { Order } from "../../shared/contract/schedule.ts";

/** The schedule with an order replaced, or added at the end where it is new. */
export function withOrder(schedule: Schedule, order: Order): Schedule {
  const known = schedule.orders.some(({ id }) => id === order.id);
  const orders = known
    ? schedule.orders.map((each) => (each.id === order.id ? order : each))
    : [...schedule.orders, order];
  return { ...schedule, orders };
}

/** The schedule without an order and without the records of its doses, which would be of nothing. */
export function withoutOrder(schedule: Schedule, id: string): Schedule {
  return {
    ...schedule,
    orders: schedule.orders.filter((order) => order.id !== id),
    records: schedule.records.filter(({ orderId }) => orderId !== id),
  };
}

/** The schedule with one dose of an order planned otherwise; without an exception, as the rest of its order. */
export function withException(
  schedule: Schedule,
  orderId: string,
  occurrence: number,
  exception: Order["exceptions"][number] | undefined,
): Schedule {
  const orders = schedule.orders.map((order) => {
    if (order.id !== orderId) return order;
    const others = order.exceptions.filter((each) => each.occurrence !== occurrence);
    const exceptions = exception === undefined ? others : [...others, exception];
    return { ...order, exceptions: exceptions.sort((one, other) => one.occurrence - other.occurrence) };
  });
  return { ...schedule, orders };
}
