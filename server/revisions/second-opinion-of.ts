import type { RegimenContent, SecondOpinion } from "../../shared/contract/case.ts";
import { compareWithSecondOpinion } from "../../shared/kinetics/second-opinion.ts";
import { courseOfContent, givenDiffers } from "../../shared/schedule/course-of-content.ts";

/** The larger difference of what was given and, where that is another course, what was planned. */
export function secondOpinionOfContent(content: RegimenContent): SecondOpinion {
  const given = compareWithSecondOpinion(courseOfContent(content, "given").course);
  if (!givenDiffers(content)) return given;
  const planned = compareWithSecondOpinion(courseOfContent(content, "planned").course);
  return planned.relative > given.relative ? planned : given;
}
