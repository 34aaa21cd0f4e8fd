import { describe, expect, test } from "vitest";
import { Schedule } from "../../../shared/contract/case.ts";
import { complaints } from "./refused.ts";

const from = "2026-03-28T08:00:00+00:00";
const order = {
  id: "order-1",
  give: { kind: "bolus", amountMg: 500 },
  when: { kind: "every", from, intervalH: 12, end: { kind: "count", doses: 6 } },
};

describe("Schedule", () => {
  test("takes an order and states what is left out", () => {
    expect(Schedule.parse({ orders: [order] })).toEqual({
      orders: [{ ...order, exceptions: [], note: "" }],
      records: [],
      extras: [],
    });
  });

  test("takes clock times with unequal amounts, exceptions, records and extra doses", () => {
    const whole = {
      orders: [
        {
          ...order,
          when: {
            kind: "clock-times",
            from,
            times: [{ time: "08:00" }, { time: "20:00", amountMg: 250 }],
            end: { kind: "open" },
          },
          exceptions: [
            { occurrence: 1, skip: true },
            { occurrence: 2, at: from, amountMg: 300 },
          ],
        },
      ],
      records: [{ orderId: "order-1", occurrence: 0, outcome: { kind: "changed", at: from } }],
      extras: [{ id: "extra-1", at: from, give: { kind: "infusion", amountMg: 100, durationH: 1 } }],
    };
    expect(complaints(Schedule, whole)).toEqual([]);
  });

  test.for<[string, object, string | RegExp]>([
    [
      "an interval of zero",
      when({ kind: "every", from, intervalH: 0, end: { kind: "open" } }),
      "orders/0/when/intervalH: must be from 0.25 to 2160 h",
    ],
    // A record of the one was once taken for the other as well.
    ["two orders with one id", { orders: [order, order] }, "orders/1/id: must not be used twice"],
    [
      "an order that ends before it begins",
      when({ ...order.when, end: { kind: "until", at: "2026-03-28T09:00:00+01:00" } }),
      "orders/0/when/end/at: must be later than from: nothing would be given",
    ],
    [
      "a year whose clocks nobody knows",
      when({ kind: "once", at: "0001-01-01T08:00:00Z" }),
      "orders/0/when/at: must lie in the years 1975 to 2199",
    ],
    [
      "a pump log without steps",
      { orders: [{ ...order, give: { kind: "pump", steps: [] } }] },
      "orders/0/give/steps: must hold at least two steps: a rate and a stop",
    ],
    ["a count of zero", when({ ...order.when, end: { kind: "count", doses: 0 } }), /^orders\/0\/when\/end\/doses: /],
    [
      "a time without an offset",
      when({ kind: "once", at: "2026-03-28T08:00:00" }),
      "orders/0/when/at: must be a date and time with offset, such as 2026-03-29T08:00:00+01:00",
    ],
    [
      "a day that does not exist",
      when({ kind: "once", at: "2026-02-30T08:00:00Z" }),
      /^orders\/0\/when\/at: must be a date and time with offset/,
    ],
    [
      "a clock time of 24:00",
      clock([{ time: "24:00" }]),
      "orders/0/when/times/0/time: must be a 24-hour time such as 08:00",
    ],
    [
      "a clock time in twelve hours",
      clock([{ time: "8:00 pm" }]),
      "orders/0/when/times/0/time: must be a 24-hour time such as 08:00",
    ],
    [
      "a clock time twice",
      clock([{ time: "08:00" }, { time: "08:00", amountMg: 5 }]),
      "orders/0/when/times: must not name a time twice",
    ],
    ["no clock time", clock([]), /^orders\/0\/when\/times: /],
    [
      "a pump log without a stop",
      pump([0, 50]),
      "orders/0/give/steps: must hold at least two steps: a rate and a stop",
    ],
    [
      "a pump log that does not end at 0",
      pump([0, 50], [2, 10]),
      "orders/0/give/steps/1/rateMgPerH: must be 0 mg/h: the log must say when the pump stopped",
    ],
    [
      "a pump log out of order",
      pump([2, 50], [1, 0]),
      "orders/0/give/steps/1/afterH: must be later than the step before it",
    ],
    [
      "one dose edited twice",
      {
        orders: [
          {
            ...order,
            exceptions: [
              { occurrence: 1, skip: true },
              { occurrence: 1, amountMg: 5 },
            ],
          },
        ],
      },
      "orders/0/exceptions/1/occurrence: dose 2 of this order is edited twice",
    ],
    [
      "an order without an id that can be pointed at",
      { orders: [{ ...order, id: "a b" }] },
      "orders/0/id: must be 1 to 40 letters, digits or hyphens",
    ],
    [
      "a record of a negative occurrence",
      { orders: [order], records: [{ orderId: "order-1", occurrence: -1, outcome: { kind: "omitted" } }] },
      /^records\/0\/occurrence: /,
    ],
    [
      "51 orders",
      { orders: Array.from({ length: 51 }, (_, index) => ({ ...order, id: `order-${index}` })) },
      /^orders: /,
    ],
  ])("refuses %s", ([, change, complaint]) => {
    const found = complaints(Schedule, { orders: [order], ...change });
    expect(found.length).toBeGreaterThanOrEqual(1);
    if (typeof complaint === "string") expect(found).toContain(complaint);
    else expect(found[0]).toMatch(complaint);
  });
});

function when(value: object): object {
  return { orders: [{ ...order, when: value }] };
}

function clock(times: object[]): object {
  return when({ kind: "clock-times", from, times, end: { kind: "open" } });
}

function pump(...steps: [afterH: number, rateMgPerH: number][]): object {
  return {
    orders: [
      { ...order, give: { kind: "pump", steps: steps.map(([afterH, rateMgPerH]) => ({ afterH, rateMgPerH })) } },
    ],
  };
}
