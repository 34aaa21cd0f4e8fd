import type { Dose } from "../contract/dose.ts";
import type { Give } from "../contract/schedule.ts";

/** Milligrams in one dose as ordered, before the salt factor; for a pump, rate x time of all its steps. */
export function amountGivenMg(give: Give): number {
  if (give.kind !== "pump") return give.amountMg;
  return staircaseMg(give.steps.map(({ afterH, rateMgPerH }) => ({ fromH: afterH, rateMgPerH })));
}

/** The same of a dose in elapsed hours. */
export function doseMg(dose: Dose): number {
  if (dose.kind !== "pump") return dose.amountMg;
  return staircaseMg(dose.steps.map(({ atH, rateMgPerH }) => ({ fromH: atH, rateMgPerH })));
}

/** Each rate holds until the next step. */
function staircaseMg(steps: readonly { readonly fromH: number; readonly rateMgPerH: number }[]): number {
  return steps.slice(1).reduce((sum, next, index) => {
    const { fromH, rateMgPerH } = steps[index]!;
    return sum + rateMgPerH * (next.fromH - fromH);
  }, 0);
}
