import { describe, expect, test } from "vitest";
import { readLimited, readOptional } from "../../../client/controls/read-field.ts";
import { printedUnit } from "../../../shared/units/printed-unit.ts";

describe("readLimited", () => {
  test("takes the ends of what is allowed", () => {
    expect(readLimited("bioavailability", "1")).toEqual({ ok: true, value: 1 });
    expect(readLimited("lagH", "0")).toEqual({ ok: true, value: 0 });
  });

  test("names the field, the value and what is allowed", () => {
    expect(readLimited("amountMg", "2000000")).toEqual({
      ok: false,
      problem: "Amount must be from 0.000001\u00a0mg to 1,000,000\u00a0mg, got 2,000,000\u00a0mg",
    });
    expect(readLimited("concentrationMgPerL", "", "Low end")).toEqual({ ok: false, problem: "Low end is empty" });
  });

  test("an optional field that is empty says nothing", () => {
    expect(readOptional("amountMg", "  ")).toBeUndefined();
    expect(readOptional("amountMg", "x")).toMatchObject({ ok: false });
  });
});

test("no unit on screen has a slash that can be read as a 1", () => {
  expect(printedUnit("eliminationRatePerH")).toBe("per h");
  expect(printedUnit("rateMgPerH")).toBe("mg per hour");
});
