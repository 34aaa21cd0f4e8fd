import fc from "fast-check";
import type { CourseInput } from "../../../shared/kinetics/course.ts";

type Dose = CourseInput["doses"][number];
type Change = NonNullable<CourseInput["eliminationChanges"]>[number];

/** Spread evenly from min to max, in 2^30 steps: fc.double would spread evenly over bit patterns, so mostly near 0. */
function even(min: number, max: number): fc.Arbitrary<number> {
  return fc.integer({ min: 0, max: 2 ** 30 }).map((step) => min + ((max - min) * step) / 2 ** 30);
}

/** Spread evenly over orders of magnitude. */
export function logarithmic(min: number, max: number): fc.Arbitrary<number> {
  return even(Math.log(min), Math.log(max)).map(Math.exp);
}

/** Quarter hours, so that events fall together as they do on real charts, or any time at all. */
export function hourUpTo(maxH: number): fc.Arbitrary<number> {
  return fc.oneof(
    fc.integer({ min: 0, max: Math.floor(4 * maxH) }).map((quarters) => quarters / 4),
    even(0, maxH),
  );
}

const amountMg = logarithmic(1, 2000);

/** Kinetics over the ranges of the reference courses; one in four has ka = k exactly. */
export const randomParameters = fc
  .record({
    volumeL: logarithmic(0.5, 300),
    eliminationRatePerH: logarithmic(0.004, 1.2),
    absorptionRatePerH: logarithmic(0.02, 6),
    bioavailability: even(0.3, 1),
    saltFactor: even(0.5, 1),
    equalRates: fc.integer({ min: 0, max: 3 }),
  })
  .map(({ equalRates, ...parameters }) => ({
    ...parameters,
    ...(equalRates === 0 && { absorptionRatePerH: parameters.eliminationRatePerH }),
  }));

/** A dose that begins by maxH; infusions and lags may reach past it. */
export function randomDose(maxH: number): fc.Arbitrary<Dose> {
  const atH = hourUpTo(maxH);
  return fc.oneof(
    fc.record({ kind: fc.constant("bolus" as const), atH, amountMg }),
    fc.record({ kind: fc.constant("infusion" as const), atH, amountMg, durationH: logarithmic(0.1, 60) }),
    fc.record({ kind: fc.constant("absorbed" as const), atH, amountMg, lagH: fc.constantFrom(0, 0.25, 0.5, 1.75) }),
    randomPump(maxH),
  );
}

/** A pump log that ends with 0 mg/h. */
export function randomPump(maxH: number): fc.Arbitrary<Dose> {
  return fc.uniqueArray(hourUpTo(maxH), { minLength: 2, maxLength: 6 }).chain((hours) =>
    fc
      .array(fc.oneof(fc.constant(0), logarithmic(0.5, 200)), {
        minLength: hours.length - 1,
        maxLength: hours.length - 1,
      })
      .map((rates) => ({
        kind: "pump" as const,
        steps: hours.sort((one, other) => one - other).map((atH, index) => ({ atH, rateMgPerH: rates[index] ?? 0 })),
      })),
  );
}

function randomChange(maxH: number): fc.Arbitrary<Change> {
  const fromH = hourUpTo(maxH);
  return fc.oneof(
    fc.record({ fromH, eliminationRatePerH: fc.oneof(fc.constant(0), logarithmic(0.004, 1.2)) }),
    fc.record({ fromH, clearanceLPerH: logarithmic(0.05, 20) }),
    fc
      .record({ fromH, lengthH: logarithmic(0.25, 12), addedClearanceLPerH: logarithmic(0.05, 10) })
      .map(({ lengthH, ...span }) => ({ ...span, toH: span.fromH + lengthH })),
  );
}

/** Courses of up to 12 doses and 4 changes of elimination, everything overlapping everything. */
export function randomCourse(
  options: { readonly changes: "none" | "any" } = { changes: "any" },
): fc.Arbitrary<CourseInput> {
  return fc.constantFrom(24, 48, 72, 168).chain((horizonH) =>
    fc.record({
      parameters: randomParameters,
      eliminationChanges:
        options.changes === "none" ? fc.constant([]) : fc.array(randomChange(horizonH), { maxLength: 4 }),
      startConcentrationMgPerL: fc.oneof(fc.constant(0), logarithmic(0.5, 20)),
      doses: fc.array(randomDose(horizonH), { minLength: 1, maxLength: 12 }),
      horizonH: fc.constant(horizonH),
    }),
  );
}

/** Ascending times within a course, its ends among them. */
export function timesWithin(horizonH: number, count = 12): fc.Arbitrary<number[]> {
  return fc
    .array(hourUpTo(horizonH), { minLength: 1, maxLength: count })
    .map((times) => [...new Set([0, ...times, horizonH])].sort((one, other) => one - other));
}
