import { describe, expect, test } from "vitest";
import { doseTable } from "../../../client/doses/dose-table.ts";
import { givenDoses } from "../../../shared/schedule/doses-given.ts";
import { inventedContent } from "../../invented-content.ts";

/** 500 mg over 1 h every 8 h for two days; the second omitted, the third late with 400 mg, and one extra. */
const content = inventedContent({
  schedule: {
    records: [
      { orderId: "o1", occurrence: 1, outcome: { kind: "omitted" } },
      { orderId: "o1", occurrence: 2, outcome: { kind: "changed", at: "2026-03-03T01:00:00Z", amountMg: 400 } },
    ],
    extras: [{ id: "x", at: "2026-03-02T09:30:00Z", give: { kind: "bolus", amountMg: 50 } }],
  },
});

describe("doseTable", () => {
  const { columns, rows } = doseTable(givenDoses(content), content.schedule, "UTC");

  test("has a cell for every column and a row for every dose, omitted ones too", () => {
    expect(rows).toHaveLength(7);
    for (const row of rows) expect(row).toHaveLength(columns.length);
  });

  test("says what is planned and what was given, with nothing where nothing was", () => {
    const find = (outcome: string) => rows.find((row) => row[6] === outcome)?.slice(1);
    expect(find("omitted")).toEqual(["infusion", "2026-03-02 16:00", 8, 500, 1, "omitted", "", "", ""]);
    expect(find("given otherwise")).toEqual([
      "infusion",
      "2026-03-03 00:00",
      16,
      500,
      1,
      "given otherwise",
      "2026-03-03 01:00",
      400,
      1,
    ]);
    expect(find("extra dose")).toEqual(["bolus", "", "", "", "", "extra dose", "2026-03-02 09:30", 50, ""]);
    expect(find("nothing recorded")).toEqual([
      "infusion",
      "2026-03-02 08:00",
      0,
      500,
      1,
      "nothing recorded",
      "",
      "",
      "",
    ]);
  });
});
