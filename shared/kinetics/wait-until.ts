import { DomainError } from "../errors.ts";
import { beginsH, type Course } from "./course.ts";
import { crossingsOf } from "./crossings.ts";
import { levelsAt } from "./levels.ts";
import { type Walk, walk } from "./walk.ts";

export interface WaitQuestion {
  /** From when: what is given at this hour counts as given. */
  readonly fromH: number;
  readonly mgPerL: number;
  readonly direction: "below" | "above";
  /**
   * "nothing-more": whatever runs is stopped at fromH, and only what is in the body or being absorbed is left.
   * "nothing-begins": no dose begins after fromH, and what runs goes on to its end.
   */
  readonly meanwhile: "nothing-more" | "nothing-begins" | "plan-goes-on";
}

export type WaitAnswer =
  | { readonly kind: "at"; readonly atH: number }
  | { readonly kind: "already"; readonly mgPerL: number }
  | { readonly kind: "never"; readonly why: string };

/** Beyond a hundred years the answer to "when" is "never". */
const longestH = 876_600;

/**
 * When the level first passes below (or above) a value, exactly. With nothing more given the question
 * has an answer beyond the plan's end, so it is followed as far as it takes; with the plan going
 * on it is followed to the end of the plan.
 *
 * @throws {DomainError} if fromH is outside the plan or mgPerL is not a number of 0 or more
 */
export function waitUntil(course: Course, question: WaitQuestion): WaitAnswer {
  const { fromH, mgPerL, direction, meanwhile } = question;
  if (!(fromH >= 0 && fromH < course.horizonH))
    throw new DomainError("fromH", fromH, `from 0 to below ${course.horizonH}`);
  if (!(mgPerL >= 0)) throw new DomainError("mgPerL", mgPerL, "0 or more");
  const followed =
    meanwhile === "plan-goes-on" ? course : { ...course, doses: dosesFollowed(course, fromH, meanwhile) };
  const [nowMgPerL] = levelsAt(walk(followed), [fromH]);
  if (direction === "below" ? nowMgPerL! < mgPerL : nowMgPerL! > mgPerL) return { kind: "already", mgPerL: nowMgPerL! };
  const wanted = direction === "below" ? "falling" : "rising";
  const search = (made: Walk) =>
    crossingsOf(made, mgPerL, { fromH, toH: made.horizonH }).find((crossing) => crossing.direction === wanted);
  if (meanwhile === "plan-goes-on") {
    const crossing = search(walk(followed));
    return crossing ? { kind: "at", atH: crossing.atH } : { kind: "never", why: "not before the plan ends" };
  }
  for (let horizonH = Math.max(course.horizonH, lastEventH(followed) + 1); horizonH <= longestH; horizonH *= 2) {
    const crossing = search(walk({ ...followed, horizonH }));
    if (crossing) return { kind: "at", atH: crossing.atH };
  }
  return {
    kind: "never",
    why: direction === "below" ? neverBelow(followed, mgPerL) : "what has been given does not reach it",
  };
}

function dosesFollowed(
  { doses }: Course,
  fromH: number,
  meanwhile: "nothing-more" | "nothing-begins",
): Course["doses"] {
  const begun = doses.filter((dose) => beginsH(dose) <= fromH);
  return meanwhile === "nothing-begins" ? begun : begun.flatMap((dose) => stopped(dose, fromH));
}

/** A dose whose pump or infusion is stopped at an hour; what was swallowed or injected stays given. */
function stopped(dose: Course["doses"][number], atH: number): Course["doses"] {
  if (dose.kind === "infusion") {
    const ranH = Math.min(dose.durationH, atH - dose.atH);
    return ranH > 0 ? [{ ...dose, durationH: ranH, amountMg: (dose.amountMg * ranH) / dose.durationH }] : [];
  }
  if (dose.kind !== "pump") return [dose];
  const before = dose.steps.filter((step) => step.atH < atH);
  return before.length === 0 ? [] : [{ kind: "pump", steps: [...before, { atH, rateMgPerH: 0 }] }];
}

function neverBelow(course: Course, mgPerL: number): string {
  if (mgPerL === 0) return "a level that falls exponentially never reaches 0 mg/L";
  if (course.doses.some((dose) => dose.kind === "pump" && dose.steps.at(-1)!.rateMgPerH > 0))
    return "a pump is left running";
  return "nothing is eliminated fast enough";
}

/** The last hour at which anything changes by itself. */
function lastEventH(course: Course): number {
  const ends = course.doses.map((dose) => {
    if (dose.kind === "pump") return dose.steps.at(-1)!.atH;
    if (dose.kind === "infusion") return dose.atH + dose.durationH;
    return dose.kind === "absorbed" ? dose.atH + dose.lagH : dose.atH;
  });
  return Math.max(0, course.elimination.at(-1)!.fromH, ...ends);
}
