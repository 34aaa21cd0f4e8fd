import { msPerHour } from "../schedule/clock.ts";
import { spanOf } from "../schedule/expand-orders.ts";
import { dueTimes } from "../schedule/order-times.ts";
import type { ContentSubject, Rule } from "./subject.ts";

/** An order whose every dose lies beyond the plan's end is not in the prediction. */
export const idleOrders: Rule<ContentSubject> = ({ content }) =>
  content.schedule.orders.flatMap((order, index) => {
    const due = dueTimes(order, spanOf(content), `schedule/orders/${index}`);
    const { start, horizonH } = content.setting.plan;
    const within = due.some(({ at }) => Date.parse(at) - Date.parse(start) < horizonH * msPerHour);
    if (within) return [];
    const text = `Order ${index + 1} gives no dose within the plan, so it is not in the prediction. Lengthen the plan, or change the order.`;
    return [{ code: "order-without-dose", severity: "warn", text, about: `/schedule/orders/${index}` }];
  });
