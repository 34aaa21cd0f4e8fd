import type { Dose } from "../contract/dose.ts";
import type { Contribution } from "../contract/prediction.ts";
import { DomainError } from "../errors.ts";
import { beginsH, type Course, effectiveMg } from "./course.ts";
import { type Survival, survivalUntil } from "./survival.ts";

/**
 * What is left at one hour of each dose given until then, and of the concentration present at the start.
 * The body is linear, so each part is the level its dose would leave alone, and the parts add up.
 *
 * Cost: doses + changes of elimination (and, for an infusion, the changes it runs through).
 *
 * @returns "start" first (where there was a level), then one per dose that has begun, in the order of `doses`
 * @throws {DomainError} if atH is outside the plan
 */
export function remainsAt(course: Course, atH: number): Contribution[] {
  if (!(atH >= 0 && atH <= course.horizonH)) throw new DomainError("remainsAtH", atH, `from 0 to ${course.horizonH}`);
  const survival = survivalUntil(course, atH);
  const { volumeL } = course.kinetics;
  const parts: { dose: number | "start"; mgPerL: number }[] = [];
  if (course.startConcentrationMgPerL > 0)
    parts.push({ dose: "start", mgPerL: survival.ofBodyMg(course.startConcentrationMgPerL * volumeL, 0) / volumeL });
  course.doses.forEach((dose, index) => {
    if (beginsH(dose) <= atH) parts.push({ dose: index, mgPerL: leftOf(course, dose, survival) / volumeL });
  });
  const total = parts.reduce((level, part) => level + part.mgPerL, 0);
  return parts.map((part) => ({ ...part, percent: total > 0 ? (100 * part.mgPerL) / total : 0 }));
}

/** Milligrams of one dose that are in the body at the hour asked about. */
function leftOf(course: Course, dose: Dose, survival: Survival): number {
  if (dose.kind === "bolus") return survival.ofBodyMg(effectiveMg(course, dose), dose.atH);
  if (dose.kind === "absorbed") return survival.ofDepotMg(effectiveMg(course, dose), dose.atH + dose.lagH);
  if (dose.kind === "infusion")
    return survival.ofRate(effectiveMg(course, dose) / dose.durationH, dose.atH, dose.atH + dose.durationH);
  return dose.steps.reduce((leftMg, { atH, rateMgPerH }, index) => {
    if (rateMgPerH === 0) return leftMg;
    return leftMg + survival.ofRate(course.saltFactor * rateMgPerH, atH, dose.steps[index + 1]?.atH ?? course.horizonH);
  }, 0);
}
