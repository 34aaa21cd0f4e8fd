import type { RegimenContent } from "../../shared/contract/case.ts";
import { DomainError } from "../../shared/errors.ts";
import { type Prepared, prepare } from "../../shared/figures/prepared.ts";
import { levelsAt } from "../../shared/kinetics/levels.ts";
import { givenDiffers } from "../../shared/schedule/course-of-content.ts";
import { givenDoses } from "../../shared/schedule/doses-given.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { sayRefusal } from "../case/say-refusal.ts";

/** One alternative ready to be read, or why it cannot be computed. */
export type Prediction =
  | {
      readonly ok: true;
      /** What was given, with the plan going on. */
      readonly given: Prepared;
      /** The plan alone, where something was given otherwise. */
      readonly planned?: Prepared;
      /** Every dose in the order of time, omitted ones too. */
      readonly doses: readonly ScheduledDose[];
    }
  | { readonly ok: false; readonly problem: string };

const known = new WeakMap<RegimenContent, Prediction>();

/** The prediction of a content. A content keeps its identity while nothing in it changes, so each is computed once. */
export function predictionOf(content: RegimenContent): Prediction {
  const found = known.get(content);
  if (found !== undefined) return found;
  const made = predict(content);
  known.set(content, made);
  return made;
}

/** Answers for a content whose prediction follows from another one without computing all of it. */
export function rememberPrediction(content: RegimenContent, prediction: Prediction): void {
  known.set(content, prediction);
}

/** Level of a prepared alternative at one hour, in mg/L; at a bolus the value just after it. */
export function levelAt({ made }: Prepared, atH: number): number {
  return levelsAt(made, [Math.min(Math.max(0, atH), made.horizonH)])[0]!;
}

function predict(content: RegimenContent): Prediction {
  try {
    const planned = givenDiffers(content) && { planned: prepare(content, "planned") };
    return { ok: true, given: prepare(content, "given"), ...planned, doses: givenDoses(content) };
  } catch (error) {
    if (error instanceof DomainError) return { ok: false, problem: sayRefusal(error, content.timeZone) };
    throw error;
  }
}
