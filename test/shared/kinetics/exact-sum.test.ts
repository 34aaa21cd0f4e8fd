import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { ExactSum } from "../../../shared/kinetics/exact-sum.ts";
import { checkedBy } from "../property-run.ts";

/** Rates as they are met: each finite double that a dose could make, from a microgram a year to a kilogram a minute. */
const rate = fc.double({ min: 1e-10, max: 1e8, noNaN: true });

describe("ExactSum", () => {
  test("keeps what a running sum loses: 1e16 + 1 - 1e16 is 1", () => {
    const sum = new ExactSum();
    for (const value of [1e16, 1, -1e16]) sum.add(value);
    expect(1e16 + 1 - 1e16).toBe(0);
    expect(sum.value).toBe(1);
  });

  test("is exactly 0 when everything added has been taken away, in any order", () => {
    checkedBy(
      fc.property(fc.array(rate, { maxLength: 60 }), fc.infiniteStream(fc.nat()), (rates, choices) => {
        const sum = new ExactSum();
        for (const value of rates) sum.add(value);
        const running = [...rates];
        while (running.length > 0) sum.add(-running.splice(choices.next().value % running.length, 1)[0]!);
        expect(sum.value).toBe(0);
      }),
    );
  });

  test("is the one number left when all others have been taken away", () => {
    checkedBy(
      fc.property(fc.array(rate, { minLength: 1, maxLength: 60 }), (rates) => {
        const sum = new ExactSum();
        for (const value of rates) sum.add(value);
        for (const value of rates.slice(1)) sum.add(-value);
        expect(sum.value).toBe(rates[0]);
      }),
    );
  });

  test("adds whole numbers up to exactly what integer arithmetic gives", () => {
    checkedBy(
      fc.property(fc.array(fc.maxSafeInteger(), { maxLength: 60 }), (numbers) => {
        const sum = new ExactSum();
        for (const value of numbers) sum.add(value);
        // Number(bigint) rounds the exact sum once, to even; the parts, added from the smallest, may round twice.
        const exact = Number(numbers.reduce((total, value) => total + BigInt(value), 0n));
        expect(Math.abs(sum.value - exact)).toBeLessThanOrEqual(Number.EPSILON * Math.abs(exact));
      }),
    );
  });
});
