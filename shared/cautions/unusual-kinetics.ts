import type { Caution } from "../contract/caution.ts";
import type { LimitName } from "../contract/limits.ts";
import type { ContentSubject, CourseSubject, Rule } from "./subject.ts";
import { unusualValue } from "./unusual-value.ts";

/** Stated kinetics of a case and the values derived from them. */
export const unusualKinetics: Rule<CourseSubject> = (subject) => kineticCautions(subject, "/setting/kinetics");

/** The same of a stateless request, which states them at another place. */
export const unusualParameters: Rule<CourseSubject> = (subject) => kineticCautions(subject, "/parameters");

function kineticCautions({ course }: CourseSubject, at: string): Caution[] {
  const { given: _, ...kinetics } = course.kinetics;
  const { absorptionRatePerH, bioavailability, saltFactor } = course;
  const values = {
    ...kinetics,
    bioavailability,
    saltFactor,
    ...(absorptionRatePerH !== undefined && { absorptionRatePerH }),
  };
  return Object.entries(values).flatMap(([name, value]) => unusualValue(name as LimitName, value, `${at}/${name}`));
}

/** Values that only a dated case states. */
export const unusualSetting: Rule<ContentSubject> = ({ content: { setting } }) => [
  ...unusualValue("horizonH", setting.plan.horizonH, "/setting/plan/horizonH"),
  ...unusualValue("lagH", setting.kinetics.lagH?.value ?? 0, "/setting/kinetics/lagH"),
  ...unusualValue("concentrationMgPerL", setting.startConcentration?.valueMgPerL ?? 0, "/setting/startConcentration"),
  ...setting.eliminationChanges.flatMap((change, index) => {
    const about = `/setting/eliminationChanges/${index}`;
    if (change.kind === "rate") return unusualValue("changedRatePerH", change.eliminationRatePerH, about);
    if (change.kind === "clearance") return unusualValue("changedClearanceLPerH", change.clearanceLPerH, about);
    return unusualValue("addedClearanceLPerH", change.addedClearanceLPerH, about);
  }),
];
