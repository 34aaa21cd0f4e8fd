import { describe, expect, test } from "vitest";
import { courseOf } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { secondOpinionLevels } from "../../../shared/kinetics/second-opinion.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { type IntegratedCase, integratedCases } from "./integrated-cases.ts";

/** What the engine promises, relative to the largest level of the case. */
const tolerance = 1e-8;

/**
 * scipy looks for a peak with an abscissa tolerance of 1e-10 h, so a flat-topped peak keeps its level but
 * not its hour: near a maximum the level changes by less than its last digits over some 1e-5 h.
 */
const hourTolerance = 2e-5;

function measured(reference: IntegratedCase) {
  const course = courseOf(reference.input);
  const made = walk(course);
  const window = { fromH: reference.window_h[0], toH: reference.window_h[1] };
  const threshold = reference.threshold_mg_per_l;
  const exposure = exposureOf(made, window, { low: threshold / 2, high: threshold });
  return { course, exposure, levels: levelsAt(made, reference.times_h) };
}

describe("the walk against scipy's integration (DOP853, rtol 1e-12)", () => {
  test.for(integratedCases)("$id: every level", (reference) => {
    const { levels } = measured(reference);
    const largest = Math.max(...reference.answers.conc_mg_per_l);
    reference.answers.conc_mg_per_l.forEach((level, point) => {
      expect(Math.abs(levels[point]! - level) / largest).toBeLessThanOrEqual(tolerance);
    });
  });

  test.for(integratedCases)("$id: area, peak, trough and hours above", (reference) => {
    const { exposure } = measured(reference);
    const { answers, window_h } = reference;
    const largest = Math.max(...answers.conc_mg_per_l);
    const hours = window_h[1] - window_h[0];
    expect(Math.abs(exposure.aucMgHPerL - answers.auc_mg_h_per_l) / (largest * hours)).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(exposure.peak.mgPerL - answers.max[0]) / largest).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(exposure.trough.mgPerL - answers.min[0]) / largest).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(exposure.hoursAbove! - answers.time_above_h) / hours).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(exposure.peak.atH - answers.max[1])).toBeLessThanOrEqual(hourTolerance);
  });

  test.for(integratedCases)("$id: the second opinion agrees too", (reference) => {
    const { course } = measured(reference);
    const largest = Math.max(...reference.answers.conc_mg_per_l);
    const convolved = secondOpinionLevels(course, reference.times_h);
    reference.answers.conc_mg_per_l.forEach((level, point) => {
      expect(Math.abs(convolved[point]! - level) / largest).toBeLessThanOrEqual(tolerance);
    });
  });

  test("leaves a margin of at least a thousand over the whole set", () => {
    const worst = { level: 0, area: 0, peak: 0, trough: 0, hoursAbove: 0 };
    for (const reference of integratedCases) {
      const { exposure, levels } = measured(reference);
      const { answers, window_h } = reference;
      const largest = Math.max(...answers.conc_mg_per_l);
      const hours = window_h[1] - window_h[0];
      answers.conc_mg_per_l.forEach((level, point) => {
        worst.level = Math.max(worst.level, Math.abs(levels[point]! - level) / largest);
      });
      worst.area = Math.max(worst.area, Math.abs(exposure.aucMgHPerL - answers.auc_mg_h_per_l) / (largest * hours));
      worst.peak = Math.max(worst.peak, Math.abs(exposure.peak.mgPerL - answers.max[0]) / largest);
      worst.trough = Math.max(worst.trough, Math.abs(exposure.trough.mgPerL - answers.min[0]) / largest);
      worst.hoursAbove = Math.max(worst.hoursAbove, Math.abs(exposure.hoursAbove! - answers.time_above_h) / hours);
    }
    console.info("largest relative differences from scipy", worst);
    for (const difference of Object.values(worst)) expect(difference).toBeLessThanOrEqual(tolerance / 1000);
  });
});
