import type { RegimenContent } from "../contract/case.ts";
import type { Instant } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";
import type { Course } from "../kinetics/course.ts";
import { type SteadyState, steadyState } from "../kinetics/steady-state.ts";
import { type Walk, walk } from "../kinetics/walk.ts";
import { hoursBetween } from "../schedule/clock.ts";
import { courseOfContent } from "../schedule/course-of-content.ts";
import { cycleOf } from "../schedule/cycle.ts";
import type { ScheduledDose } from "../schedule/scheduled-dose.ts";

/** What is planned, or what was given so far with the plan going on. */
export type Which = "planned" | "given";

/** The repeating part of a schedule and the cycle it settles into, or why there is none. */
export type Settled =
  | {
      readonly kind: "cycle";
      readonly startsAt: Instant;
      readonly startsAtH: number;
      /** Clock times are among its orders, so it keeps the clock where daylight saving begins or ends. */
      readonly keepsClock: boolean;
      readonly course: Course;
      readonly steady: SteadyState;
    }
  | { readonly kind: "none"; readonly why: string };

/** One alternative made ready to be read: its course, walked once, and its steady state. */
export interface Prepared {
  readonly content: RegimenContent;
  readonly which: Which;
  readonly course: Course;
  readonly doses: readonly ScheduledDose[];
  readonly made: Walk;
  readonly settled: Settled;
}

/**
 * Expands, walks and solves one alternative, so that every figure after it reads instead of computing again.
 *
 * @throws {DomainError} if the content's kinetics or schedule cannot be computed
 */
export function prepare(content: RegimenContent, which: Which = "given"): Prepared {
  const { course, doses } = courseOfContent(content, which);
  return { content, which, course, doses, made: walk(course), settled: settledOf(content, course) };
}

/** The elimination of the end of the plan is repeated: what added clearance or change holds last, holds for ever. */
function settledOf(content: RegimenContent, course: Course): Settled {
  const cycle = cycleOf(content);
  if (cycle.kind === "none") return cycle;
  const last = course.elimination.at(-1)!;
  if (!(last.ratePerH > 0)) return { kind: "none", why: "elimination stops, so the level never settles" };
  const cycleCourse: Course = {
    ...course,
    elimination: [{ ...last, fromH: 0 }],
    startConcentrationMgPerL: 0,
    doses: cycle.doses,
    horizonH: cycle.cycleH,
  };
  const startsAtH = hoursBetween(content.setting.plan.start, cycle.startsAt);
  return solved(() => ({
    kind: "cycle",
    startsAt: cycle.startsAt,
    startsAtH,
    keepsClock: content.schedule.orders.some(
      ({ id, when }) => when.kind === "clock-times" && cycle.orderIds.includes(id),
    ),
    course: cycleCourse,
    steady: steadyState(cycleCourse, content.setting.rangeMgPerL),
  }));
}

/** A cycle that cannot be solved (a pump log longer than it) has no steady state; the rest still has figures. */
function solved(solve: () => Settled): Settled {
  try {
    return solve();
  } catch (error) {
    if (error instanceof DomainError) return { kind: "none", why: error.message };
    throw error;
  }
}
