import { describe, expect, test } from "vitest";
import { outermost, turningPoints } from "../../../client/reading/turning-points.ts";
import { curvePoints } from "../../../shared/figures/curve-points.ts";
import { courseOf } from "../../../shared/kinetics/course.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { walk } from "../../../shared/kinetics/walk.ts";

const parameters = { volumeL: 50, halfLifeH: 6, bioavailability: 1, saltFactor: 1 };

describe("curvePoints", () => {
  const made = walk(
    courseOf({
      parameters,
      doses: [
        { kind: "bolus", atH: 0, amountMg: 500 },
        { kind: "bolus", atH: 6, amountMg: 500 },
        { kind: "infusion", atH: 12, amountMg: 300, durationH: 0.5 },
      ],
      horizonH: 24,
    }),
  );
  const points = curvePoints(made, { fromH: 0, toH: 24 }, 300);

  test("has the level just before and just after a bolus: 5 and 15 mg/L (by hand: 10 mg/L halved in 6 h, then 10 more)", () => {
    const [before, after] = points.filter(({ x }) => x === 6).map(({ y }) => y);
    expect(before).toBeCloseTo(5, 12);
    expect(after).toBeCloseTo(15, 12);
  });

  test("has a point at the start and the end of an infusion, is in the order of time and agrees with the walk", () => {
    expect(points.map(({ x }) => x)).toEqual(expect.arrayContaining([12, 12.5, 24]));
    expect(points.every(({ x }, index) => index === 0 || x >= points[index - 1]!.x)).toBe(true);
    const smooth = points.filter(({ x }) => x !== 6 && x !== 0);
    const levels = levelsAt(
      made,
      smooth.map(({ x }) => x),
    );
    for (const [index, { y }] of smooth.entries()) expect(Math.abs(y - levels[index]!)).toBeLessThan(1e-12 * 25);
  });

  test("is no denser than four points a pixel, and loses no peak, where doses are denser than pixels", () => {
    const doses = Array.from({ length: 2_000 }, (_, index) => ({
      kind: "bolus" as const,
      atH: index,
      amountMg: index === 777 ? 900 : 50,
    }));
    const dense = walk(courseOf({ parameters, doses, horizonH: 2_000 }));
    const drawn = curvePoints(dense, { fromH: 0, toH: 2_000 }, 200);
    expect(drawn.length).toBeLessThanOrEqual(800);
    expect(Math.max(...drawn.map(({ y }) => y))).toBe(levelsAt(dense, [777])[0]);
  });

  test.each(["linear", "logarithmic"] as const)(
    "as drawn on a %s axis has far fewer points, the same events, and is nowhere a fifth of a pixel off",
    (scale) => {
      const window = { fromH: 0, toH: 24 };
      const all = curvePoints(made, window, 1_200);
      const drawn = curvePoints(made, window, 1_200, scale);
      expect(drawn.length).toBeLessThan(all.length / 3);
      for (const atH of [0, 6, 12, 12.5, 24]) {
        const at = (points: typeof all) => points.filter(({ x }) => x === atH);
        expect(at(drawn)).toEqual(at(all));
      }
      const high = Math.max(...all.map(({ y }) => y));
      const pixel = (y: number) => (scale === "linear" ? (y / high) * 384 : Math.log10(y / high) * 384);
      let segment = 0;
      for (const { x, y } of all.slice(1, -1)) {
        while (drawn[segment + 1]!.x < x) segment++;
        const [from, to] = [drawn[segment]!, drawn[segment + 1]!];
        if (x === from.x || x === to.x || !(from.y > 0)) continue;
        const line = pixel(from.y) + ((pixel(to.y) - pixel(from.y)) * (x - from.x)) / (to.x - from.x);
        expect(Math.abs(line - pixel(y))).toBeLessThan(0.2);
      }
    },
  );

  test("keeps to a part of the plan", () => {
    const part = curvePoints(made, { fromH: 5, toH: 7 }, 300);
    expect(part[0]!.x).toBe(5);
    expect(part.at(-1)!.x).toBe(7);
  });
});

describe("turningPoints", () => {
  test("finds the peak just after a bolus and the trough just before it, not the ends of the window", () => {
    const made = walk(
      courseOf({
        parameters,
        doses: [
          { kind: "infusion", atH: 1, amountMg: 500, durationH: 1 },
          { kind: "bolus", atH: 8, amountMg: 500 },
        ],
        horizonH: 24,
      }),
    );
    const turns = turningPoints(made, { fromH: 0, toH: 24 });
    expect(turns.map(({ kind, atH }) => ({ kind, atH }))).toEqual([
      { kind: "peak", atH: 2 },
      { kind: "trough", atH: 8 },
      { kind: "peak", atH: 8 },
    ]);
    expect(turns[2]!.mgPerL - turns[1]!.mgPerL).toBeCloseTo(10, 12);
    expect(outermost(turns).map(({ kind, atH }) => `${kind} ${atH}`)).toEqual(["peak 8", "trough 8"]);
  });
});
