import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type CourseInput, courseOf } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { steadyState } from "../../../shared/kinetics/steady-state.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { absorbed, bolus, cycle, infusion, inputOf, level } from "./asked.ts";
import { logarithmic, randomDose, randomParameters, randomPump } from "./random-courses.ts";

type Change = NonNullable<CourseInput["eliminationChanges"]>[number];

/** Cycles with doses of every kind, infusions and pump logs longer than the cycle and lags that pass its end among them. */
const randomCycle = fc
  .constantFrom(4, 6, 8, 12, 24)
  .chain((cycleH) =>
    fc.record({
      cycleH: fc.constant(cycleH),
      parameters: randomParameters.map((parameters) => ({
        ...parameters,
        eliminationRatePerH: Math.max(0.03, parameters.eliminationRatePerH),
        absorptionRatePerH: Math.max(0.1, parameters.absorptionRatePerH),
      })),
      doses: fc.array(
        fc.oneof(
          { weight: 4, arbitrary: randomDose(cycleH - 0.25) },
          { weight: 1, arbitrary: randomPump(2.5 * cycleH) },
        ),
        {
          minLength: 1,
          maxLength: 5,
        },
      ),
      session: fc.option(
        fc.record({ fromH: fc.integer({ min: 0, max: cycleH - 3 }), addedClearanceLPerH: logarithmic(0.5, 10) }),
      ),
    }),
  )
  .map(({ session, ...rest }) => ({
    ...rest,
    changes: session === null ? [] : [{ ...session, toH: session.fromH + 2 }],
  }));

/** The same cycle given again and again as a plain course. */
function manyCycles(input: CourseInput, cycleH: number, count: number): CourseInput {
  const each = <Part>(make: (laterH: number) => Part[]) =>
    Array.from({ length: count }, (_, index) => make(index * cycleH)).flat();
  return {
    ...input,
    horizonH: count * cycleH,
    doses: each((laterH) =>
      input.doses.map((dose) =>
        dose.kind === "pump"
          ? { ...dose, steps: dose.steps.map((step) => ({ ...step, atH: step.atH + laterH })) }
          : { ...dose, atH: dose.atH + laterH },
      ),
    ),
    eliminationChanges: each((laterH) => (input.eliminationChanges ?? []).map((change) => later(change, laterH))),
  };
}

function later(change: Change, byH: number): Change {
  return "toH" in change
    ? { ...change, fromH: change.fromH + byH, toH: change.toH + byH }
    : { ...change, fromH: change.fromH + byH };
}

describe("steadyState", () => {
  test("is the limit of many cycles, whatever is given and however far it overlaps", () => {
    checkedBy(
      fc.property(randomCycle, ({ cycleH, parameters, doses, changes }) => {
        const input = { parameters, doses, eliminationChanges: changes, horizonH: cycleH };
        // e^-36 of the distance from steady state is left: k is at least 0.03, ka 0.1, and the last infusion has overlapped.
        const count = Math.ceil((36 / 0.03 + 70) / cycleH);
        const steady = steadyState(courseOf(input));
        const long = walk(courseOf(manyCycles(input, cycleH, count)));
        const lastH = (count - 1) * cycleH;
        const offsets = Array.from({ length: 16 }, (_, index) => (cycleH * (index + 0.37)) / 16);
        const wanted = levelsAt(
          long,
          offsets.map((offsetH) => lastH + offsetH),
        );
        const got = levelsAt(steady.made, offsets);
        const { peak, trough, aucMgHPerL } = exposureOf(long, { fromH: lastH, toH: lastH + cycleH });
        const tolerance = 1e-10 * peak.mgPerL;
        for (const index of offsets.keys())
          expect(Math.abs(got[index]! - wanted[index]!)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(steady.exposure.peak.mgPerL - peak.mgPerL)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(steady.exposure.trough.mgPerL - trough.mgPerL)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(steady.exposure.aucMgHPerL - aucMgHPerL)).toBeLessThanOrEqual(1e-10 * aucMgHPerL);
      }),
      { runs: 60 },
    );
  });

  test("ends where it began", () => {
    checkedBy(
      fc.property(randomCycle, ({ cycleH, parameters, doses, changes }) => {
        const { made, startMgPerL, exposure } = steadyState(
          courseOf({ parameters, doses, eliminationChanges: changes, horizonH: cycleH }),
        );
        expect(Math.abs(levelsAt(made, [cycleH])[0]! - startMgPerL)).toBeLessThanOrEqual(1e-12 * exposure.peak.mgPerL);
      }),
    );
  });

  test("has the area F S dose / CL over each cycle, where CL does not change", () => {
    checkedBy(
      fc.property(randomCycle, ({ cycleH, parameters, doses }) => {
        const withoutPumps = doses.filter((dose) => dose.kind !== "pump");
        fc.pre(withoutPumps.length > 0);
        const course = courseOf({ parameters, doses: withoutPumps, horizonH: cycleH });
        const givenMg = withoutPumps.reduce(
          (sum, dose) =>
            sum + parameters.saltFactor * dose.amountMg * (dose.kind === "absorbed" ? parameters.bioavailability : 1),
          0,
        );
        const wanted = givenMg / course.kinetics.clearanceLPerH;
        const { exposure, auc24MgHPerL } = steadyState(course);
        expect(Math.abs(exposure.aucMgHPerL - wanted)).toBeLessThanOrEqual(1e-11 * wanted);
        expect(Math.abs(auc24MgHPerL - (wanted * 24) / cycleH)).toBeLessThanOrEqual((1e-11 * wanted * 24) / cycleH);
      }),
    );
  });

  test("an infusion of 30 h every 12 h is two and a half at once: the average is the dose rate over CL", () => {
    const body = { volumeL: 20, clearanceLPerH: 2 };
    const { exposure } = cycle(body, [infusion(600, 30)], 12);
    expect(exposure.averageMgPerL).toBeCloseTo(600 / 12 / 2, 10); // dose / (CL tau), by hand
    // Three run for 6 h and two for 6 h, by hand: the level swings between what 60 and 40 mg/h would hold.
    expect(exposure.peak.mgPerL).toBeLessThan(30);
    expect(exposure.trough.mgPerL).toBeGreaterThan(20);
  });

  test("a lag over the cycle's end moves the curve and nothing else", () => {
    const body = { volumeL: 20, clearanceLPerH: 2, absorptionRatePerH: 0.8 };
    const [prompt, late] = [cycle(body, [absorbed(300, 0)], 12), cycle(body, [absorbed(300, 11, 7)], 12)]; // 11 + 7 = 12 + 6
    expect(late.exposure.peak.mgPerL).toBeCloseTo(prompt.exposure.peak.mgPerL, 12);
    expect(late.exposure.peak.atH).toBeCloseTo(prompt.exposure.peak.atH + 6, 7);
    expect(late.startMgPerL).toBeCloseTo(levelsAt(prompt.made, [6])[0]!, 12);
  });

  test("has no accumulation ratio where all of the first cycle is lag", () => {
    const steady = cycle({ volumeL: 20, clearanceLPerH: 2, absorptionRatePerH: 0.8 }, [absorbed(300, 11, 7)], 12);
    expect(steady).not.toHaveProperty("accumulationRatio");
    expect(steady.exposure.averageMgPerL).toBeCloseTo(300 / 2 / 12, 10);
  });

  test("08:00 and 20:00 with unequal doses: each trough by hand from two geometric series", () => {
    const body = { volumeL: 10, eliminationRatePerH: Math.LN2 / 12 }; // halves every 12 h
    const { exposure, startMgPerL } = cycle(body, [bolus(200), bolus(100, 12)], 24);
    // x before the first dose: ((x + 20) / 2 + 10) / 2 = x, so x = 40/3 mg/L; before the second (x + 20) / 2 = 50/3.
    expect(startMgPerL).toBeCloseTo(40 / 3, 12);
    expect(exposure.peak.mgPerL).toBeCloseTo(40 / 3 + 20, 12);
    expect(exposure.trough.mgPerL).toBeCloseTo(40 / 3, 12);
  });

  test("swing, fluctuation and accumulation, by hand for a dose every half-life", () => {
    const steady = cycle({ volumeL: 10, halfLifeH: 6 }, [bolus(100)], 6); // 20 mg/L to 10 mg/L
    expect(steady.swing).toBeCloseTo(1, 12);
    expect(steady.accumulationRatio).toBeCloseTo(2, 12);
    expect(steady.fluctuation).toBeCloseTo(10 / (100 / ((10 * Math.LN2) / 6) / 6), 12); // (20 - 10) / (dose / (CL tau))
    expect(level({ volumeL: 10, halfLifeH: 6 }, [], 0, { startConcentrationMgPerL: steady.startMgPerL })).toBeCloseTo(
      10,
      12,
    );
  });

  test("refuses what has no steady state", () => {
    const still = { volumeL: 10, eliminationRatePerH: 0.1 };
    const stopped = inputOf(still, [bolus(100)], 12, { eliminationChanges: [{ fromH: 0, eliminationRatePerH: 0 }] });
    expect(() => steadyState(courseOf(stopped))).toThrow(/eliminationRatePerH must be above 0 somewhere in the cycle/);
    const unstopped = { kind: "pump" as const, steps: [{ atH: 0, rateMgPerH: 10 }] };
    expect(() => cycle(still, [unstopped], 12)).toThrow("doses/0/steps must be 0 mg/h at the last step");
    expect(() => cycle(still, [bolus(100), bolus(100, 12)], 12)).toThrow(
      "doses/1/atH must be from 0 to below 12, got 12",
    );
    expect(() => cycle(still, [], 12)).not.toThrow();
  });
});
