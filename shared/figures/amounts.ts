import type { Give } from "../contract/schedule.ts";
import { amountGivenMg, doseMg } from "../schedule/given-amount.ts";
import type { Figure, Value } from "./figure.ts";
import { momentAt } from "./moment.ts";
import type { Prepared } from "./prepared.ts";

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
  const cycleMg = course.doses.reduce((sum, dose) => sum + doseMg(dose), 0);
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
