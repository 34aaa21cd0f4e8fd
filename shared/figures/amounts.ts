import type { Dose } from "../contract/dose.ts";
import type { Give } from "../contract/schedule.ts";
import { type Figure, isValue } from "./figure.ts";
import { momentAt } from "./moment.ts";
import type { Prepared } from "./prepared.ts";

/** Milligrams in one dose as ordered, before the salt factor; for a pump, rate x time of all its steps. */
export function amountGivenMg(give: Give): number {
  if (give.kind !== "pump") return give.amountMg;
  return give.steps.slice(1).reduce((sum, step, index) => {
    const before = give.steps[index]!;
    return sum + before.rateMgPerH * (step.afterH - before.afterH);
  }, 0);
}

/** Highest rate of one dose, mg per hour; undefined where the whole amount enters at once or by absorption. */
export function highestRateMgPerH(give: Give): number | undefined {
  if (give.kind === "infusion") return give.amountMg / give.durationH;
  if (give.kind === "pump") return Math.max(...give.steps.map(({ rateMgPerH }) => rateMgPerH));
  return undefined;
}

/** All amounts given over the plan, as ordered. */
export function totalAmount({ doses }: Prepared): Figure {
  return { value: doses.reduce((sum, { give }) => sum + amountGivenMg(give), 0), unit: "mg" };
}

/** Amount per day of the repeating orders. */
export function amountPerDay({ settled }: Prepared): Figure {
  if (settled.kind === "none") return { absent: settled.why };
  const { course, steady } = settled;
  const cycleMg = course.doses.reduce((sum, dose) => sum + cycleDoseMg(dose), 0);
  return { value: (cycleMg * 24) / steady.cycleH, unit: "mg per day" };
}

export function highestAmount(prepared: Prepared): Figure {
  return highest(prepared, "no dose is given", ({ give }) => ({ value: amountGivenMg(give), unit: "mg" }));
}

export function highestRate(prepared: Prepared): Figure {
  return highest(prepared, "nothing is given at a rate", ({ give }) => {
    const rate = highestRateMgPerH(give);
    return rate === undefined ? undefined : { value: rate, unit: "mg per hour" };
  });
}

type Scheduled = Prepared["doses"][number];

function highest({ content, doses }: Prepared, absent: string, read: (dose: Scheduled) => Figure | undefined): Figure {
  let best: Figure = { absent };
  for (const dose of doses) {
    const figure = read(dose);
    if (figure === undefined || !isValue(figure)) continue;
    if (!isValue(best) || figure.value > best.value) best = { ...figure, ...momentAt(content, dose.atH) };
  }
  return best;
}

function cycleDoseMg(dose: Dose): number {
  if (dose.kind !== "pump") return dose.amountMg;
  return dose.steps.slice(1).reduce((sum, step, index) => {
    const before = dose.steps[index]!;
    return sum + before.rateMgPerH * (step.atH - before.atH);
  }, 0);
}
