import { beforeAll, describe, expect, test } from "vitest";
import { draftOfOrder, readOrderDraft } from "../../../client/orders/order-draft.ts";
import { loadPumpLogReader } from "../../../client/orders/pump-log-reader.ts";
import { Order } from "../../../shared/contract/schedule.ts";

const zone = "Europe/London";
beforeAll(loadPumpLogReader);

const kept = { id: "one", exceptions: [] };

/** Amounts and times are invented. */
const orders: Order[] = [
  {
    id: "one",
    give: { kind: "infusion", amountMg: 500, durationH: 0.5 },
    when: { kind: "every", from: "2026-03-28T08:00:00Z", intervalH: 12, end: { kind: "count", doses: 6 } },
    exceptions: [],
    note: "with food",
  },
  {
    id: "one",
    give: { kind: "absorbed", amountMg: 0.000125 },
    when: {
      kind: "clock-times",
      from: "2026-03-28T08:00:00Z",
      times: [{ time: "08:00" }, { time: "20:00", amountMg: 250 }],
      end: { kind: "until", at: "2026-04-01T08:00:00+01:00" },
    },
    exceptions: [],
    note: "",
  },
  {
    id: "one",
    give: { kind: "bolus", amountMg: 1000 },
    // The second 01:30 of the night in which the clock goes back.
    when: { kind: "once", at: "2026-10-25T01:30:00Z" },
    exceptions: [],
    note: "",
  },
  {
    id: "one",
    give: {
      kind: "pump",
      steps: [
        { afterH: 0, rateMgPerH: 50 },
        { afterH: 3.5, rateMgPerH: 12.5 },
        { afterH: 6, rateMgPerH: 0 },
      ],
    },
    when: { kind: "once", at: "2026-03-28T08:00:00Z" },
    exceptions: [],
    note: "",
  },
];

describe("readOrderDraft", () => {
  test.for(orders)("an order comes back from its editor as it was: $give.kind, $when.kind", (order) => {
    const read = readOrderDraft(draftOfOrder(order, zone), kept, zone);
    expect(read).toEqual({ ok: true, order });
    expect(Order.parse(order)).toEqual(order);
  });

  test("tells every problem at once, by field", () => {
    const read = readOrderDraft(
      { kind: "infusion", when: "every", end: "count", amount: "0,5", doses: "1.5" },
      kept,
      zone,
    );
    expect(read.ok ? [] : Object.keys(read.problems).sort()).toEqual(["amount", "at", "doses", "duration", "interval"]);
  });

  test("refuses a clock time named twice, one that is none, and an end before the start", () => {
    const draft = {
      kind: "bolus",
      amount: "5",
      when: "clock-times",
      at: "2026-03-28 08:00",
      times: "3",
      "time.0": "8:00",
      "time.1": "20:00",
      "time.2": "20:00",
      end: "until",
      until: "2026-03-28 07:00",
    };
    const read = readOrderDraft(draft, kept, zone);
    expect(read.ok ? {} : read.problems).toEqual({
      "time.0": "Clock time 1 must be a 24-hour time such as 08:00, got 8:00",
      "time.2": "Clock time 3 must not name 20:00 twice",
      until: "Until must be later than From (2026-03-28 08:00), got 2026-03-28 07:00",
    });
  });

  test("dates a pump log given once by its own first line", () => {
    const pump = "time,rate\n2026-03-29 17:20,50\n2026-03-30 05:30,20\n2026-03-30 21:00,0";
    const read = readOrderDraft({ kind: "pump", when: "once", at: "2026-03-28 08:00", pump }, kept, zone);
    expect(read.ok && read.order.when).toEqual({ kind: "once", at: "2026-03-29T17:20:00+01:00" });
    const steps = [
      { afterH: 0, rateMgPerH: 50 },
      { afterH: 12.1666667, rateMgPerH: 20 },
      { afterH: 27.6666667, rateMgPerH: 0 },
    ];
    expect(read.ok && read.order.give).toEqual({ kind: "pump", steps });
  });

  test("tells the lines of a pump log that are wrong", () => {
    const draft = { kind: "pump", when: "once", at: "2026-03-28 08:00", pump: "time,rate\n0,50\n2,25,5\n1,0" };
    const read = readOrderDraft(draft, kept, zone);
    expect(read.ok ? "" : read.problems["pump"]).toMatch(/line 3: .*decimal comma/);
  });
});
