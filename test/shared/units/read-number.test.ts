import { describe, expect, test } from "vitest";
import { readNumber } from "../../../shared/units/read-number.ts";

describe("readNumber", () => {
  test.for([
    ["12", 12],
    [" 0.5 ", 0.5],
    ["-3", -3],
    ["007", 7],
  ] as const)("reads %j as %s", ([text, value]) => {
    expect(readNumber(text)).toEqual({ ok: true, value });
  });

  test.for([
    ["", "is empty"],
    ["0,5", "must be written without a comma, such as 0.5 or 1000, got 0,5"],
    ["1,000", "must be written without a comma, such as 0.5 or 1000, got 1,000"],
    [".5", "must have a zero before the point, such as 0.5, got .5"],
    ["5.", "must be a plain number, such as 0.5 or 12, got 5."],
    ["1e3", "must be a plain number, such as 0.5 or 12, got 1e3"],
    ["5 mg", "must be a plain number, such as 0.5 or 12, got 5 mg"],
    ["NaN", "must be a plain number, such as 0.5 or 12, got NaN"],
    ["Infinity", "must be a plain number, such as 0.5 or 12, got Infinity"],
    ["٥", "must be a plain number, such as 0.5 or 12, got ٥"],
  ] as const)("refuses %j and says what to write", ([text, problem]) => {
    expect(readNumber(text)).toEqual({ ok: false, problem });
  });

  test("refuses a number too large to be one", () => {
    expect(readNumber("9".repeat(400))).toMatchObject({ ok: false });
  });
});
