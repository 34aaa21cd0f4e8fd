import { describe, expect, test } from "vitest";
import { draftOfDose, type OrderedDose, readDoseDraft } from "../../../client/doses/dose-draft.ts";
import { withDoseEdit } from "../../../client/doses/record-edits.ts";
import type { Schedule } from "../../../shared/contract/case.ts";

const zone = "Europe/London";

/** Invented. */
const dose: OrderedDose = {
  key: "one#1",
  orderId: "one",
  occurrence: 1,
  give: { kind: "infusion", amountMg: 500, durationH: 0.5 },
  at: "2026-03-28T20:00:00Z",
  atH: 12,
  status: "planned",
  edited: false,
};

const schedule: Schedule = {
  orders: [
    {
      id: "one",
      give: dose.give,
      when: { kind: "every", from: "2026-03-28T08:00:00Z", intervalH: 12, end: { kind: "open" } },
      exceptions: [{ occurrence: 2, skip: true }],
      note: "",
    },
  ],
  records: [],
  extras: [],
};

describe("readDoseDraft", () => {
  test("reads a dose given late with less, and its editor says so again", () => {
    const read = readDoseDraft(
      { given: "changed", "given-at": "2026-03-28 22:30", "given-amount": "400", note: "late" },
      dose,
      zone,
    );
    const record = {
      orderId: "one",
      occurrence: 1,
      outcome: { kind: "changed" as const, at: "2026-03-28T22:30:00Z", amountMg: 400 },
      note: "late",
    };
    expect(read).toEqual({ ok: true, edit: { record } });
    expect(readDoseDraft(draftOfDose(undefined, record, zone), dose, zone)).toEqual(read);
  });

  test("reads a dose that is left out of the plan and one that is planned otherwise", () => {
    expect(readDoseDraft({ plan: "left-out" }, dose, zone)).toEqual({
      ok: true,
      edit: { exception: { occurrence: 1, skip: true } },
    });
    expect(readDoseDraft({ plan: "changed", "plan-duration": "2" }, dose, zone)).toEqual({
      ok: true,
      edit: { exception: { occurrence: 1, durationH: 2 } },
    });
  });

  test("refuses a change that changes nothing, and a wrong number with its field", () => {
    expect(readDoseDraft({ given: "changed" }, dose, zone)).toMatchObject({
      ok: false,
      problems: { "given-at": expect.any(String) },
    });
    expect(readDoseDraft({ given: "changed", "given-amount": "4oo" }, dose, zone)).toMatchObject({
      ok: false,
      problems: { "given-amount": expect.stringContaining("got 4oo") },
    });
  });

  test("the amount and duration of a pump log stay", () => {
    const pump: OrderedDose = {
      ...dose,
      give: {
        kind: "pump",
        steps: [
          { afterH: 0, rateMgPerH: 5 },
          { afterH: 1, rateMgPerH: 0 },
        ],
      },
    };
    expect(
      readDoseDraft({ given: "changed", "given-at": "2026-03-28 22:30", "given-amount": "400" }, pump, zone),
    ).toEqual({
      ok: true,
      edit: {
        record: { orderId: "one", occurrence: 1, outcome: { kind: "changed", at: "2026-03-28T22:30:00Z" }, note: "" },
      },
    });
  });
});

describe("withDoseEdit", () => {
  test("replaces what was said about this dose and leaves the others", () => {
    const once = withDoseEdit(schedule, dose, {
      record: { orderId: "one", occurrence: 1, outcome: { kind: "omitted" }, note: "" },
    });
    expect(once.records).toHaveLength(1);
    const again = withDoseEdit(once, dose, { exception: { occurrence: 1, amountMg: 250 } });
    expect(again.records).toEqual([]);
    expect(again.orders[0]?.exceptions).toEqual([
      { occurrence: 1, amountMg: 250 },
      { occurrence: 2, skip: true },
    ]);
    expect(schedule.orders[0]?.exceptions).toHaveLength(1);
  });
});
