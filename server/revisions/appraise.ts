import { cautionsForContent, unanswered } from "../../shared/cautions/gather.ts";
import type { RegimenContent, SecondOpinion } from "../../shared/contract/case.ts";
import type { Caution } from "../../shared/contract/caution.ts";
import { DomainError } from "../../shared/errors.ts";
import { compareWithSecondOpinion } from "../../shared/kinetics/second-opinion.ts";
import { courseOfContent, givenDiffers } from "../../shared/schedule/course-of-content.ts";

/** What there is to say about one alternative before it is saved; plain data, so that it may come from a thread. */
export type Appraisal =
  | { readonly ok: true; readonly open: readonly Caution[]; readonly secondOpinion: SecondOpinion }
  | { readonly ok: false; readonly field: string; readonly problem: string };

/** Its cautions that stop and have no reason yet, and its second opinion; or why it cannot be computed. */
export function appraise(content: RegimenContent): Appraisal {
  try {
    const open = unanswered(cautionsForContent(content), content.cautionReasons);
    return { ok: true, open, secondOpinion: secondOpinionOf(content) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { ok: false, field: error.field, problem: `must be ${error.allowed}, got ${String(error.value)}` };
  }
}

/** The larger difference of what was given and, where that is another course, what was planned. */
function secondOpinionOf(content: RegimenContent): SecondOpinion {
  const given = compareWithSecondOpinion(courseOfContent(content, "given").course);
  if (!givenDiffers(content)) return given;
  const planned = compareWithSecondOpinion(courseOfContent(content, "planned").course);
  // NaN is the largest difference of all: it must not lose a comparison.
  return planned.relative <= given.relative ? given : planned;
}
