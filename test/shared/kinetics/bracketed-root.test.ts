import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bracketedRoot } from "../../../shared/kinetics/bracketed-root.ts";
import { checkedBy } from "../property-run.ts";
import { logarithmic } from "./random-courses.ts";

describe("bracketedRoot", () => {
  test.for([
    { name: "a line", f: (x: number) => x - 0.3, low: 0, high: 1, root: 0.3 },
    { name: "a falling line, ends the other way up", f: (x: number) => 0.3 - x, low: 0, high: 1, root: 0.3 },
    {
      name: "cos x = x (Dottie number, OEIS A003957)",
      f: (x: number) => Math.cos(x) - x,
      low: 0,
      high: 1,
      root: 0.7390851332151607,
    },
    { name: "a flat cube", f: (x: number) => (x - 0.5) ** 3, low: 0, high: 2, root: 0.5 },
    { name: "a step", f: (x: number) => (x < 0.7 ? -1 : 1), low: 0, high: 1, root: 0.7 },
    { name: "a wall", f: (x: number) => Math.atan(1e9 * (x - 0.3)), low: 0, high: 1, root: 0.3 },
    { name: "a root at the lower end", f: (x: number) => x, low: 0, high: 1, root: 0 },
    { name: "a root at the upper end", f: (x: number) => x - 1, low: 0, high: 1, root: 1 },
  ])("finds $name", ({ f, low, high, root, name }) => {
    // A cube is 0 in doubles wherever its argument is below some 1e-108, so any such point is a root of it.
    const allowed = name === "a flat cube" ? 1e-15 : 4 * Number.EPSILON * root;
    expect(Math.abs(bracketedRoot(f, low, high) - root)).toBeLessThanOrEqual(allowed);
  });

  test("finds e^-kx = y, whose root is known, in some ten looks", () => {
    let looks = 0;
    let roots = 0;
    checkedBy(
      fc.property(logarithmic(0.01, 5), logarithmic(1e-6, 0.9), (k, y) => {
        roots++;
        const root = bracketedRoot(
          (x) => {
            looks++;
            return Math.exp(-k * x) - y;
          },
          0,
          20 / k,
        );
        // ln y / k is known to a unit or two; e^-kx is flat to a unit in its last place over 1 / (k x) units of x.
        const known = -Math.log(y) / k;
        expect(Math.abs(root - known)).toBeLessThanOrEqual((6 + 2 / (k * known)) * Number.EPSILON * known);
      }),
    );
    expect(looks / roots).toBeLessThan(20);
  });
});
