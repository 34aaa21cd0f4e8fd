import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { courseOf } from "../../../shared/kinetics/course.ts";
import { crossingsOf } from "../../../shared/kinetics/crossings.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { waitUntil } from "../../../shared/kinetics/wait-until.ts";
import { type Walk, walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { absorbed, bolus, infusion, inputOf, running } from "./asked.ts";
import { hourUpTo, randomCourse } from "./random-courses.ts";

const body = { volumeL: 10, halfLifeH: 6, absorptionRatePerH: 1 };
const walked = (doses: Parameters<typeof inputOf>[1], horizonH = 48) => walk(courseOf(inputOf(body, doses, horizonH)));
const percent = fc.integer({ min: 2, max: 98 });

/** How much the level changes over a few units in the last place of the hour: no hour can be told finer. */
function blurAt(made: Walk, atH: number): number {
  const byH = 8 * Number.EPSILON * Math.max(1, atH);
  const [before, after] = levelsAt(made, [Math.max(0, atH - byH), Math.min(made.horizonH, atH + byH)]);
  return Math.abs(after! - before!);
}

describe("crossingsOf", () => {
  test("the level at a crossing is the value, unless a bolus jumps over it there", () => {
    checkedBy(
      fc.property(randomCourse(), percent, (input, height) => {
        const made = walk(courseOf(input));
        const { peak } = exposureOf(made, { fromH: 0, toH: input.horizonH });
        const mgPerL = (height / 100) * peak.mgPerL;
        fc.pre(mgPerL > 0);
        for (const { atH, direction } of crossingsOf(made, mgPerL, { fromH: 0, toH: input.horizonH })) {
          const [level] = levelsAt(made, [atH]);
          const jumps = input.doses.some((dose) => dose.kind === "bolus" && Math.abs(dose.atH - atH) <= 1e-9);
          if (jumps && direction === "rising") expect(level).toBeGreaterThanOrEqual(mgPerL * (1 - 1e-12));
          else expect(Math.abs(level! - mgPerL)).toBeLessThanOrEqual(1e-9 * peak.mgPerL + blurAt(made, atH));
        }
      }),
    );
  });

  test("between two crossings the level keeps to one side, and directions take turns", () => {
    checkedBy(
      fc.property(randomCourse(), percent, (input, height) => {
        const made = walk(courseOf(input));
        const { peak } = exposureOf(made, { fromH: 0, toH: input.horizonH });
        const mgPerL = (height / 100) * peak.mgPerL;
        fc.pre(mgPerL > 0);
        const found = crossingsOf(made, mgPerL, { fromH: 0, toH: input.horizonH });
        found.slice(1).forEach(({ direction, atH }, index) => {
          expect(direction).not.toBe(found[index]!.direction);
          expect(atH).toBeGreaterThanOrEqual(found[index]!.atH);
        });
        const edges = [...found.map(({ atH }) => atH), input.horizonH];
        found.forEach(({ atH, direction }, index) => {
          const untilH = edges[index + 1]!;
          const times = Array.from({ length: 20 }, (_, step) => atH + ((untilH - atH) * (step + 0.5)) / 20);
          for (const [step, level] of levelsAt(made, times).entries()) {
            const beyond = direction === "rising" ? level - mgPerL : mgPerL - level;
            expect(beyond).toBeGreaterThanOrEqual(-1e-9 * peak.mgPerL - blurAt(made, times[step]!));
          }
        });
      }),
    );
  });

  test("a bolus that jumps over the value is a rising crossing at its hour; then it falls by half-lives", () => {
    // 100 mg / 10 L = 10 mg/L at 3 h; 5 mg/L one half-life later, by hand.
    const found = crossingsOf(walked([bolus(100, 3)]), 5, { fromH: 0, toH: 48 });
    expect(found.map(({ direction }) => direction)).toEqual(["rising", "falling"]);
    expect(found[0]!.atH).toBe(3);
    expect(found[1]!.atH).toBeCloseTo(9, 12);
  });

  test("touching the value without passing it is no crossing", () => {
    expect(crossingsOf(walked([bolus(100)]), 10, { fromH: 0, toH: 48 })).toEqual([]);
    expect(crossingsOf(walked([]), 0, { fromH: 0, toH: 48 })).toEqual([]);
  });

  test("refuses a value below 0 or not a number", () => {
    for (const mgPerL of [-1, Number.NaN])
      expect(() => crossingsOf(walked([]), mgPerL, { fromH: 0, toH: 48 })).toThrow("mgPerL must be 0 or more");
  });
});

describe("waitUntil", () => {
  const ask = (
    doses: Parameters<typeof inputOf>[1],
    mgPerL: number,
    more: Partial<Parameters<typeof waitUntil>[1]> = {},
  ) =>
    waitUntil(courseOf(inputOf(body, doses, 24)), {
      fromH: 0,
      mgPerL,
      direction: "below",
      meanwhile: "nothing-begins",
      ...more,
    });

  test("an answer is a crossing: before it the level is on the near side, after it on the far side", () => {
    checkedBy(
      fc.property(
        randomCourse({ changes: "none" }),
        percent,
        hourUpTo(20),
        fc.constantFrom("below" as const, "above" as const),
        fc.constantFrom("nothing-begins" as const, "plan-goes-on" as const),
        (input, height, fromH, direction, meanwhile) => {
          const course = courseOf(input);
          const { peak } = exposureOf(walk(course), { fromH: 0, toH: input.horizonH });
          const mgPerL = (height / 100) * peak.mgPerL;
          fc.pre(mgPerL > 0);
          const answer = waitUntil(course, { fromH, mgPerL, direction, meanwhile });
          const doses =
            meanwhile === "plan-goes-on"
              ? course.doses
              : course.doses.filter((dose) => (dose.kind === "pump" ? dose.steps[0]!.atH : dose.atH) <= fromH);
          const slack = 1e-9 * peak.mgPerL;
          const beyond = (level: number) => (direction === "below" ? mgPerL - level : level - mgPerL);
          if (answer.kind === "already") expect(beyond(answer.mgPerL)).toBeGreaterThan(0);
          if (answer.kind === "never") return;
          const atH = answer.kind === "at" ? answer.atH : fromH;
          const made = walk({ ...course, doses, horizonH: Math.max(input.horizonH, atH) + 1 });
          const before = Array.from({ length: 30 }, (_, step) => fromH + ((atH - fromH) * step) / 30);
          if (answer.kind === "at")
            for (const level of levelsAt(made, before)) expect(beyond(level)).toBeLessThanOrEqual(slack);
          const [after] = levelsAt(made, [atH + 1e-6]);
          expect(beyond(after!)).toBeGreaterThanOrEqual(-1e-3 * peak.mgPerL - slack);
        },
      ),
    );
  });

  test("nothing more given: 10 mg/L falls to 1.25 in three half-lives, beyond the plan's end too", () => {
    expect(ask([bolus(100)], 1.25)).toEqual({ kind: "at", atH: expect.closeTo(18, 10) });
    expect(ask([bolus(100)], 10 / 2 ** 20)).toEqual({ kind: "at", atH: expect.closeTo(120, 9) });
  });

  test("what is running or being absorbed goes on to its end, what has not begun does not begin", () => {
    // 40 mg/h for 12 h: still rising at 2 h, so below 5 mg/L only after its end; the dose at 6 h is not given.
    const doses = [infusion(480, 12), bolus(1000, 6)];
    const answer = ask(doses, 5, { fromH: 2.5 });
    const made = walk(courseOf(inputOf(body, [doses[0]!], 200)));
    expect(answer.kind).toBe("at");
    if (answer.kind === "at") {
      expect(answer.atH).toBeGreaterThan(12);
      expect(levelsAt(made, [answer.atH])[0]).toBeCloseTo(5, 10);
    }
  });

  test("nothing more: an infusion and a pump that run are stopped, an absorbed dose is not", () => {
    // Whatever was stopped, the level only falls from here by k: half a half-life per factor of the square root of 2.
    const level = (doses: Parameters<typeof ask>[0], atH: number) =>
      levelsAt(walk(courseOf(inputOf(body, doses, 200))), [atH])[0]!;
    for (const doses of [[infusion(480, 12)], [running(40)], [infusion(480, 12), bolus(1000, 6)]]) {
      const halved = level([doses[0]!], 2.5) / 2;
      expect(ask(doses, halved, { fromH: 2.5, meanwhile: "nothing-more" })).toEqual({
        kind: "at",
        atH: expect.closeTo(8.5, 9),
      });
    }
    expect(ask([infusion(480, 12)], 1, { fromH: 0, meanwhile: "nothing-more" })).toEqual({
      kind: "already",
      mgPerL: 0,
    });
    const absorbing = { direction: "above", fromH: 0.1 } as const;
    expect(ask([absorbed(100)], 1, { ...absorbing, meanwhile: "nothing-more" })).toEqual(
      ask([absorbed(100)], 1, absorbing),
    );
  });

  test("the plan going on: the dose at 6 h keeps the level up for one half-life longer", () => {
    // 10 mg/L; at 6 h 5 + 5 = 10 again; 5 mg/L at 12 h and not at 6 h, where it is only touched.
    expect(ask([bolus(100), bolus(50, 6)], 4.99, { meanwhile: "plan-goes-on" })).toEqual({
      kind: "at",
      atH: expect.closeTo(12 + 6 * Math.log2(5 / 4.99), 9),
    });
  });

  test("says so when the level is there already, and why it never will be", () => {
    expect(ask([bolus(100)], 20)).toEqual({ kind: "already", mgPerL: 10 });
    expect(ask([bolus(100)], 0)).toEqual({
      kind: "never",
      why: "a level that falls exponentially never reaches 0 mg/L",
    });
    expect(ask([running(40)], 1, { fromH: 12 })).toEqual({ kind: "never", why: "a pump is left running" });
    expect(ask([absorbed(100)], 50, { direction: "above" })).toEqual({
      kind: "never",
      why: "what has been given does not reach it",
    });
    expect(ask([bolus(100)], 0.001, { meanwhile: "plan-goes-on" })).toEqual({
      kind: "never",
      why: "not before the plan ends",
    });
  });

  test("refuses an hour outside the plan and a value that is no level", () => {
    for (const fromH of [-1, 24, Number.NaN])
      expect(() => ask([], 1, { fromH })).toThrow(/fromH must be from 0 to below 24/);
    for (const mgPerL of [-1, Number.NaN]) expect(() => ask([], mgPerL)).toThrow(/mgPerL must be 0 or more/);
  });
});
