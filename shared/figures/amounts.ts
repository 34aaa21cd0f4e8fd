import type { Dose } from "../contract/dose.ts";
import type { Give } from "../contract/schedule.ts";
import type { Figure, Value } from "./figure.ts";
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

/** Highest rate of one dose and how long after its time; undefined where it enters at once or by absorption. */
export function highestRateIn(give: Give): { readonly mgPerH: number; readonly afterH: number } | undefined {
  if (give.kind === "infusion") return { mgPerH: give.amountMg / give.durationH, afterH: 0 };
  if (give.kind !== "pump") return undefined;
  const step = give.steps.reduce((best, next) => (next.rateMgPerH > best.rateMgPerH ? next : best));
  return { mgPerH: step.rateMgPerH, afterH: step.afterH };
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
  return highest(prepared, "no dose is given", ({ give, atH }) => ({ value: amountGivenMg(give), unit: "mg", atH }));
}

export function highestRate(prepared: Prepared): Figure {
  return highest(prepared, "nothing is given at a rate", ({ give, atH }) => {
    const rate = highestRateIn(give);
    return rate && { value: rate.mgPerH, unit: "mg per hour", atH: atH + rate.afterH };
  });
}

type Scheduled = Prepared["doses"][number];

type Timed = Value & { readonly atH: number };

function highest({ content, doses }: Prepared, absent: string, read: (dose: Scheduled) => Timed | undefined): Figure {
  let best: Timed | undefined;
  for (const dose of doses) {
    const figure = read(dose);
    if (figure !== undefined && (best === undefined || figure.value > best.value)) best = figure;
  }
  return best === undefined ? { absent } : { ...best, ...momentAt(content, best.atH) };
}

function cycleDoseMg(dose: Dose): number {
  if (dose.kind !== "pump") return dose.amountMg;
  return dose.steps.slice(1).reduce((sum, step, index) => {
    const before = dose.steps[index]!;
    return sum + before.rateMgPerH * (step.atH - before.atH);
  }, 0);
}
