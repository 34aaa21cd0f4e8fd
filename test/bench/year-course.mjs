import { courseOf } from "../../.build/shared/kinetics/course.js";

/** A year of boluses every 6 h, looked at every minute: 1,460 doses, 525,601 points. */
export const everyH = 1 / 60;
export const points = 525_601;
export const yearInput = {
  parameters: { volumeL: 30, eliminationRatePerH: 0.1, bioavailability: 1, saltFactor: 1 },
  doses: Array.from({ length: 1460 }, (_, index) => ({ kind: "bolus", atH: 6 * index, amountMg: 250 + (index % 7) })),
  horizonH: 8760,
};

export const yearCourse = () => courseOf(yearInput);

/** Doses of every kind, one after the other, over a span in proportion to their number. */
export function mixedInput(doses) {
  return {
    parameters: { volumeL: 30, eliminationRatePerH: 0.1, absorptionRatePerH: 0.9, bioavailability: 1, saltFactor: 1 },
    doses: Array.from({ length: doses }, (_, index) => mixedDose(index)),
    horizonH: 1.7 * doses,
  };
}

function mixedDose(index) {
  const atH = 1.7 * index;
  if (index % 3 === 0) return { kind: "bolus", atH, amountMg: 100 };
  if (index % 3 === 1) return { kind: "infusion", atH, amountMg: 100, durationH: 12 };
  return { kind: "absorbed", atH, amountMg: 100, lagH: 0.5 };
}
