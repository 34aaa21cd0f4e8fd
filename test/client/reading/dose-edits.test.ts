import { describe, expect, test } from "vitest";
import { editDose, removeDose } from "../../../client/reading/dose-edits.ts";
import { Schedule } from "../../../shared/contract/case.ts";
import { DomainError } from "../../../shared/errors.ts";
import { givenDoses } from "../../../shared/schedule/doses-given.ts";
import { spanOf } from "../../../shared/schedule/expand-orders.ts";
import { contentWith, everyTwelve, onceAtNoon } from "./contents.ts";

const later = "2026-03-02T21:30:00+00:00";
const extra = { id: "x1", at: "2026-03-03T02:00:00Z", give: { kind: "bolus", amountMg: 250 } };

function opened(schedule: object) {
  const content = contentWith(schedule);
  return {
    schedule: content.schedule,
    span: spanOf(content),
    dose: (key: string) => givenDoses(content).find((each) => each.key === key)!,
  };
}

/** What the edited schedule says of one dose, after it has passed the contract. */
function reread(schedule: Schedule, key: string) {
  return givenDoses(contentWith(Schedule.parse(schedule))).find((each) => each.key === key);
}

describe("editDose", () => {
  test("moves one dose of a series by an exception and leaves the others", () => {
    const { schedule, span, dose } = opened({ orders: [everyTwelve] });
    const edited = editDose(schedule, dose("o1#1"), { at: later }, span);
    expect(edited.orders[0]!.exceptions).toEqual([{ occurrence: 1, at: later }]);
    expect(reread(edited, "o1#1")).toMatchObject({ atH: 13.5, status: "planned", edited: true });
    expect(reread(edited, "o1#2")).toMatchObject({ atH: 24, edited: false });
  });

  test("needs no exception for a dose that is put back where it belongs", () => {
    const { schedule, span, dose } = opened({
      orders: [{ ...everyTwelve, exceptions: [{ occurrence: 1, at: later }] }],
    });
    expect(editDose(schedule, dose("o1#1"), { at: "2026-03-02T20:00:00+00:00" }, span).orders[0]!.exceptions).toEqual(
      [],
    );
  });

  test("keeps another amount when the dose is moved, and the other exceptions", () => {
    const exceptions = [
      { occurrence: 1, amountMg: 250 },
      { occurrence: 3, skip: true },
    ];
    const { schedule, span, dose } = opened({ orders: [{ ...everyTwelve, exceptions }] });
    const edited = editDose(schedule, dose("o1#1"), { at: later }, span);
    expect(edited.orders[0]!.exceptions).toEqual([
      { occurrence: 1, at: later, amountMg: 250 },
      { occurrence: 3, skip: true },
    ]);
  });

  test("compares with the amount of its clock time, not with that of the order", () => {
    const when = {
      kind: "clock-times",
      from: "2026-03-02T08:00:00Z",
      times: [{ time: "08:00", amountMg: 1000 }, { time: "20:00" }],
      end: { kind: "open" },
    };
    const { schedule, span, dose } = opened({ orders: [{ ...everyTwelve, when }] });
    expect(editDose(schedule, dose("o1#0"), { amountMg: 1000 }, span).orders[0]!.exceptions).toEqual([]);
    expect(editDose(schedule, dose("o1#0"), { amountMg: 500 }, span).orders[0]!.exceptions).toEqual([
      { occurrence: 0, amountMg: 500 },
    ]);
  });

  test("changes a dose that is ordered once itself", () => {
    const { schedule, span, dose } = opened({
      orders: [everyTwelve, { ...onceAtNoon, exceptions: [{ occurrence: 0, amountMg: 600 }] }],
    });
    const edited = editDose(schedule, dose("o2#0"), { at: later }, span);
    expect(edited.orders[1]).toMatchObject({
      when: { kind: "once", at: later },
      give: { amountMg: 600 },
      exceptions: [],
    });
    expect(edited.orders[0]).toBe(schedule.orders[0]);
  });

  test("changes time, amount and duration of an extra dose", () => {
    const { schedule, span, dose } = opened({ orders: [everyTwelve], extras: [extra] });
    expect(editDose(schedule, dose("extra:x1"), { at: later, amountMg: 300 }, span).extras).toEqual([
      { id: "x1", at: later, give: { kind: "bolus", amountMg: 300 }, note: "" },
    ]);
  });

  test("writes into the record of a dose that was recorded as given, and leaves the plan", () => {
    const records = [{ orderId: "o1", occurrence: 1, outcome: { kind: "as-planned" }, note: "seen" }];
    const { schedule, span, dose } = opened({ orders: [everyTwelve], records });
    const edited = editDose(schedule, dose("o1#1"), { at: later }, span);
    expect(edited.records).toEqual([
      { orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: later }, note: "seen" },
    ]);
    expect(edited.orders).toEqual(schedule.orders);
    expect(reread(edited, "o1#1")).toMatchObject({ atH: 13.5, plannedAtH: 12, status: "changed" });
  });

  test("records a dose that is moved back to its plan as given as planned", () => {
    const records = [{ orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: later } }];
    const { schedule, span, dose } = opened({ orders: [everyTwelve], records });
    expect(editDose(schedule, dose("o1#1"), { at: "2026-03-02T20:00:00+00:00" }, span).records[0]!.outcome).toEqual({
      kind: "as-planned",
    });
  });

  test("refuses to move what was omitted, and a duration for a bolus", () => {
    const records = [{ orderId: "o1", occurrence: 1, outcome: { kind: "omitted" } }];
    const { schedule, span, dose } = opened({ orders: [everyTwelve, onceAtNoon], records });
    expect(() => editDose(schedule, dose("o1#1"), { at: later }, span)).toThrow(DomainError);
    expect(() => editDose(schedule, dose("o2#0"), { durationH: 1 }, span)).toThrow(/only an infusion has a duration/);
  });
});

describe("removeDose", () => {
  test("skips one of a series, whatever was changed about it before", () => {
    const { schedule, dose } = opened({ orders: [{ ...everyTwelve, exceptions: [{ occurrence: 1, at: later }] }] });
    const edited = removeDose(schedule, dose("o1#1"));
    expect(edited.orders[0]!.exceptions).toEqual([{ occurrence: 1, skip: true }]);
    expect(reread(edited, "o1#1")).toBeUndefined();
    expect(reread(edited, "o1#2")).toMatchObject({ atH: 24 });
  });

  test("takes an order given once away with its dose, and an extra dose", () => {
    const { schedule, dose } = opened({ orders: [everyTwelve, onceAtNoon], extras: [extra] });
    expect(removeDose(schedule, dose("o2#0")).orders.map(({ id }) => id)).toEqual(["o1"]);
    expect(removeDose(schedule, dose("extra:x1")).extras).toEqual([]);
  });

  test("records a dose that was recorded as given as omitted, so that the plan still shows it", () => {
    const records = [{ orderId: "o1", occurrence: 0, outcome: { kind: "as-planned" } }];
    const { schedule, dose } = opened({ orders: [everyTwelve], records });
    expect(reread(removeDose(schedule, dose("o1#0")), "o1#0")).toMatchObject({ status: "omitted" });
  });
});
