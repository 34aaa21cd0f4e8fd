import type { RegimenContent } from "../contract/case.ts";
import type { Caution } from "../contract/caution.ts";
import type { RangeMgPerL } from "../contract/dose.ts";
import type { Exposure } from "../contract/prediction.ts";
import type { Course } from "../kinetics/course.ts";
import { type Walk, walk } from "../kinetics/walk.ts";
import { courseOfContent } from "../schedule/course-of-content.ts";
import type { ScheduledDose } from "../schedule/scheduled-dose.ts";

/** What every rule can look at: a course, already walked, and the range it is meant for. */
export interface CourseSubject {
  readonly course: Course;
  readonly made: Walk;
  readonly range?: RangeMgPerL;
  /** Exposure of the whole plan against the range, where it is known already. */
  readonly exposure?: Exposure;
}

/** What rules about a dated schedule can look at besides. */
export interface ContentSubject extends CourseSubject {
  readonly content: RegimenContent;
  readonly doses: readonly ScheduledDose[];
}

/** One rule: the cautions it raises, none where it has nothing to say. */
export type Rule<Subject> = (subject: Subject) => Caution[];

/** @throws {DomainError} if the content cannot be computed */
export function subjectOfContent(content: RegimenContent): ContentSubject {
  const { course, doses } = courseOfContent(content, "given");
  return { content, doses, ...subjectOfCourse(course, content.setting.rangeMgPerL) };
}

export function subjectOfCourse(course: Course, range: RangeMgPerL | undefined): CourseSubject {
  return { course, made: walk(course), ...(range !== undefined && { range }) };
}
