import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expDifference, expSecondDifference, phi } from "../../../shared/kinetics/exp-differences.ts";
import { integrate } from "../../../shared/kinetics/quadrature.ts";
import { checkedBy } from "../property-run.ts";
import { logarithmic } from "./random-courses.ts";

/** k u as it is met: from a slow drug over a minute to a fast one over a week. */
const exponent = fc.oneof(fc.constant(0), logarithmic(1e-9, 60));

describe("divided differences of the exponential", () => {
  test.for([
    { x: 0, value: 1, source: "its limit" },
    { x: 1, value: 0.6321205588285577, source: "1 - 1/e, OEIS A068996" },
    { x: 1e-12, value: 0.9999999999995, source: "1 - x/2 + x^2/6, by hand" },
  ])("phi($x) is $value ($source)", ({ x, value }) => {
    expect(Math.abs(phi(x) - value)).toBeLessThanOrEqual(2 * Number.EPSILON);
  });

  test("are the integrals that define them (Hermite and Genocchi), by quadrature", () => {
    checkedBy(
      fc.property(exponent, exponent, exponent, (a, b, c) => {
        // exp[-a, -b] = integral over s in [0, 1] of e^-(a + (b - a) s)
        const first = integrate((s) => Math.exp(-(a + (b - a) * s)), 0, 1, 1e-14);
        expect(Math.abs(expDifference(a, b) / first - 1)).toBeLessThanOrEqual(1e-12);
        // exp[-a, -b, -c] = integral over s in [0, 1], r in [0, s] of e^-(a + (b - a) s + (c - b) r)
        const second = integrate(
          (s) => integrate((r) => Math.exp(-(a + (b - a) * s + (c - b) * r)), 0, s, 1e-13),
          0,
          1,
          1e-13,
        );
        expect(Math.abs(expSecondDifference(a, b, c) / second - 1)).toBeLessThanOrEqual(1e-11);
      }),
      { runs: 60 },
    );
  });

  test("do not depend on the order of their points", () => {
    checkedBy(
      fc.property(exponent, exponent, exponent, (a, b, c) => {
        expect(expDifference(a, b)).toBe(expDifference(b, a));
        const value = expSecondDifference(a, b, c);
        for (const [x, y, z] of [
          [b, c, a],
          [c, a, b],
          [b, a, c],
        ] as const)
          expect(expSecondDifference(x, y, z)).toBe(value);
      }),
    );
  });

  test("reach their limits where points meet: e^-a and e^-a / 2", () => {
    for (const a of [0, 0.3, 7]) {
      expect(expDifference(a, a)).toBe(Math.exp(-a));
      expect(expSecondDifference(a, a, a)).toBe(Math.exp(-a) / 2);
    }
  });
});

describe("integrate", () => {
  test.for([
    { name: "e^-x from 0 to 1: 1 - 1/e", f: (x: number) => Math.exp(-x), from: 0, to: 1, value: 0.6321205588285577 },
    { name: "4 / (1 + x^2) from 0 to 1: pi", f: (x: number) => 4 / (1 + x * x), from: 0, to: 1, value: Math.PI },
    { name: "sqrt x from 0 to 1: 2/3", f: Math.sqrt, from: 0, to: 1, value: 2 / 3 },
    {
      name: "x^13, which 7 Gauss points integrate exactly: 1/14",
      f: (x: number) => x ** 13,
      from: 0,
      to: 1,
      value: 1 / 14,
    },
    {
      name: "a spike of width 1e-3: pi within its tails",
      f: (x: number) => 1e-3 / (1e-6 + x * x),
      from: -1,
      to: 1,
      value: 2 * Math.atan(1e3),
    },
    { name: "nothing over nothing", f: Math.exp, from: 1, to: 1, value: 0 },
  ])("$name", ({ f, from, to, value }) => {
    expect(Math.abs(integrate(f, from, to) - value)).toBeLessThanOrEqual(1e-12 * Math.max(1, value));
  });
});
