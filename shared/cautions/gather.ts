import type { CautionReason, RegimenContent } from "../contract/case.ts";
import type { Caution } from "../contract/caution.ts";
import { assumedElimination } from "./assumed-elimination.ts";
import { clockChanges, unclearClockTimes } from "./clock-jumps.ts";
import { dosesTogether } from "./doses-together.ts";
import { eliminationStops } from "./elimination-stops.ts";
import { fallsBelow } from "./falls-below.ts";
import { givenDoesDiffer } from "./given-differs.ts";
import { idleOrders } from "./idle-orders.ts";
import { idleExceptions, lostRecords } from "./lost-records.ts";
import { notSettled } from "./not-settled.ts";
import { outsideRange } from "./outside-range.ts";
import { standingCaution } from "./standing.ts";
import { type ContentSubject, type CourseSubject, type Rule, subjectOfContent } from "./subject.ts";
import { tenfoldDoses } from "./tenfold-doses.ts";
import { unusualDoses, unusualOrders } from "./unusual-doses.ts";
import { unusualKinetics, unusualParameters, unusualSetting } from "./unusual-kinetics.ts";

const courseRules: readonly Rule<CourseSubject>[] = [eliminationStops, outsideRange, fallsBelow, assumedElimination];

const contentRules: readonly Rule<ContentSubject>[] = [
  unusualKinetics,
  unusualSetting,
  unusualOrders,
  lostRecords,
  idleExceptions,
  idleOrders,
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

/** Cautions of a course that no case states: a stateless prediction, or a repeating cycle. */
export function cautionsForCourse(subject: CourseSubject): Caution[] {
  return ordered([unusualParameters, ...courseRules, unusualDoses].flatMap((rule) => rule(subject)));
}

/** The cautions that stop and that nobody has answered yet; a reason answers one text about one place. */
export function unanswered(cautions: readonly Caution[], reasons: readonly CautionReason[]): Caution[] {
  const answered = ({ code, about, text }: Caution) =>
    reasons.some((reason) => reason.code === code && reason.about === about && reason.text === text);
  return cautions.filter((caution) => caution.severity === "stop" && !answered(caution));
}

const gravity = { stop: 0, warn: 1, note: 2 } as const;

function ordered(raised: readonly Caution[]): Caution[] {
  return [...raised, standingCaution].sort((one, other) => gravity[one.severity] - gravity[other.severity]);
}
