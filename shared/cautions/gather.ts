import type { CautionReason, RegimenContent } from "../contract/case.ts";
import type { Caution } from "../contract/caution.ts";
import type { PredictionRequest } from "../contract/prediction.ts";
import type { SteadyStateRequest } from "../contract/steady-state.ts";
import { courseOf } from "../kinetics/course.ts";
import { assumedElimination } from "./assumed-elimination.ts";
import { clockChanges, unclearClockTimes } from "./clock-jumps.ts";
import { dosesTogether } from "./doses-together.ts";
import { eliminationStops } from "./elimination-stops.ts";
import { givenDoesDiffer } from "./given-differs.ts";
import { idleExceptions, lostRecords } from "./lost-records.ts";
import { notSettled } from "./not-settled.ts";
import { outsideRange } from "./outside-range.ts";
import { standingCaution } from "./standing.ts";
import { type ContentSubject, type CourseSubject, type Rule, subjectOfContent, subjectOfCourse } from "./subject.ts";
import { tenfoldDoses } from "./tenfold-doses.ts";
import { unusualDoses, unusualOrders } from "./unusual-doses.ts";
import { unusualKinetics, unusualSetting } from "./unusual-kinetics.ts";

const courseRules: readonly Rule<CourseSubject>[] = [
  unusualKinetics,
  eliminationStops,
  outsideRange,
  assumedElimination,
];

const contentRules: readonly Rule<ContentSubject>[] = [
  unusualSetting,
  unusualOrders,
  lostRecords,
  idleExceptions,
  tenfoldDoses,
  dosesTogether,
  unclearClockTimes,
  givenDoesDiffer,
  clockChanges,
  notSettled,
];

/**
 * Everything to be said about one alternative, gravest first. Never empty: the standing caution is in it.
 *
 * @throws {DomainError} if the content cannot be computed
 */
export function cautionsForContent(content: RegimenContent): Caution[] {
  const subject = subjectOfContent(content);
  return ordered([...contentRules, ...courseRules].flatMap((rule) => rule(subject)));
}

/** Cautions of a stateless prediction. */
export function cautionsForPrediction(request: PredictionRequest): Caution[] {
  return cautionsForCourse(subjectOfCourse(courseOf(request), request.rangeMgPerL));
}

/** Cautions of a repeating cycle. */
export function cautionsForSteadyState(request: SteadyStateRequest): Caution[] {
  return cautionsForCourse(subjectOfCourse(courseOf({ ...request, horizonH: request.cycleH }), undefined));
}

/** The cautions that stop and that nobody has answered yet; a reason answers one text about one place. */
export function unanswered(cautions: readonly Caution[], reasons: readonly CautionReason[]): Caution[] {
  const answered = ({ code, about, text }: Caution) =>
    reasons.some((reason) => reason.code === code && reason.about === about && reason.text === text);
  return cautions.filter((caution) => caution.severity === "stop" && !answered(caution));
}

function cautionsForCourse(subject: CourseSubject): Caution[] {
  return ordered([...courseRules, unusualDoses].flatMap((rule) => rule(subject)));
}

const gravity = { stop: 0, warn: 1, note: 2 } as const;

function ordered(raised: readonly Caution[]): Caution[] {
  return [...raised, standingCaution].sort((one, other) => gravity[one.severity] - gravity[other.severity]);
}
