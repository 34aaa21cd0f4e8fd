import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { DomainError } from "../../../shared/errors.ts";
import { formatDose, formatDuration, formatLevel, formatQuantity, formatRate } from "../../../shared/units/format.ts";
import { findWritingFaults } from "../../writing-rules.ts";

/** The no-break space before a unit, made visible in the expectations. */
const plain = (text: string) => text.replaceAll("\u00a0", " ");

describe("formatDose", () => {
  test.for([
    { mg: 1_000, words: "1,000 mg", source: "ISMP: a comma from 1,000 up" },
    { mg: 5, words: "5 mg", source: "Joint Commission: no trailing zero" },
    { mg: 12.5, words: "12.5 mg", source: "Joint Commission: no trailing zero" },
    { mg: 0.125, words: "125 microgram", source: "NHS CUI MEDi-014: change the unit, avoid the decimal" },
    { mg: 0.1 + 0.2, words: "300 microgram", source: "no tail of binary arithmetic" },
    { mg: 0.0625, words: "62.5 microgram", source: "NHS CUI MEDi-014" },
    { mg: 0.0005, words: "500 nanogram", source: "NHS CUI MEDi-014, one unit further" },
    { mg: 1_234_567.5, words: "1,234,567.5 mg", source: "ISMP: a comma from 1,000 up" },
    { mg: -0, words: "0 mg", source: "no minus before nothing" },
  ])("writes $words ($source)", ({ mg, words }) => {
    expect(plain(formatDose(mg))).toBe(words);
  });

  test.for([Number.NaN, Number.POSITIVE_INFINITY, -1])("never prints %s", (mg) => {
    expect(() => formatDose(mg)).toThrow(DomainError);
  });

  test("keeps the writing rules for any dose", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-5, max: 1e6, noNaN: true }), (mg) => {
        expect(findWritingFaults(formatDose(mg))).toEqual([]);
      }),
    );
  });

  test("puts a space before the unit at which no line breaks", () => {
    expect(formatDose(250)).toBe("250\u00a0mg");
  });
});

describe("formatQuantity", () => {
  test.for([
    { value: 12.3456, unit: "mg/L", words: "12.35 mg/L" },
    { value: 0.000_123_456, unit: "per h", words: "0.0001235 per h" },
    { value: 123_456.7, unit: "mg·h/L", words: "123,457 mg·h/L" },
    { value: 2.0000000001, unit: "L", words: "2 L" },
    { value: 3e-15, unit: "mg/L", words: "3 × 10⁻¹⁵ mg/L" },
    { value: -0.0001, unit: "h", words: "-0.0001 h" },
    { value: 0, unit: "", words: "0" },
  ])("writes $words", ({ value, unit, words }) => {
    expect(plain(formatQuantity(value, unit))).toBe(words);
  });

  test("says the number it was given, to the digits asked for", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e9, noNaN: true }), fc.integer({ min: 3, max: 12 }), (value, digits) => {
        const said = Number(formatQuantity(value, "", digits).replaceAll(",", ""));
        // Half a unit in the last digit, and the rounding of the decimal itself.
        expect(Math.abs(said - value)).toBeLessThanOrEqual(
          0.5000001 * 10 ** (Math.floor(Math.log10(value)) + 1 - digits),
        );
      }),
    );
  });

  test("refuses what is no number", () => {
    expect(() => formatQuantity(Number.NaN, "h")).toThrow("value must be a finite number, got NaN");
  });
});

describe("other words", () => {
  test.for([
    { hours: 0.5, words: "30 min" },
    { hours: 1.5, words: "1 h 30 min" },
    { hours: 24, words: "24 h" },
    { hours: 0, words: "0 min" },
    { hours: 1.2345, words: "1.234 h" },
  ])("says $hours hours as $words", ({ hours, words }) => {
    expect(plain(formatDuration(hours))).toBe(words);
  });

  test("says a rate without a slash", () => {
    expect(plain(formatRate(125))).toBe("125 mg per hour");
    expect(plain(formatRate(1_000 / 3))).toBe("333.333 mg per hour");
  });

  test("says a level to four digits", () => {
    expect(plain(formatLevel(8.49959343))).toBe("8.5 mg/L");
  });
});
