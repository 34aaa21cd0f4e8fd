import { cautionsForContent, unanswered } from "../../shared/cautions/gather.ts";
import type { RegimenContent, SecondOpinion } from "../../shared/contract/case.ts";
import { secondOpinionTolerance } from "../../shared/kinetics/second-opinion.ts";
import { inField } from "../in-field.ts";
import { RequestError } from "../request-errors.ts";

/** Computes one alternative by both roads and gives the larger difference; may run elsewhere than on this thread. */
export type SecondOpinionOf = (content: RegimenContent) => Promise<SecondOpinion>;

/**
 * Whether something may be saved: it can be computed, nothing that stops is left without a reason, and
 * two independent calculations agree.
 *
 * @param at where the content stands in the request, such as "#/content"
 * @throws {RequestError} naming each fault
 */
export async function judgeContent(content: RegimenContent, at: string, secondOpinionOf: SecondOpinionOf): Promise<SecondOpinion> {
  const cautions = inField(at, "setting/kinetics", () => cautionsForContent(content));
  const open = unanswered(cautions, content.cautionReasons);
  if (open.length > 0) {
    const errors = open.map(({ about, code, text }) => ({ pointer: about.startsWith("/") ? at + about : at, detail: `${text} (${code})` }));
    throw new RequestError("unanswered-cautions", "write a reason for each, or change what raised it", { errors });
  }
  const opinion = await secondOpinionOf(content);
  if (!(opinion.relative <= secondOpinionTolerance))
    throw new RequestError(
      "second-opinion",
      `the two calculations differ by ${opinion.relative} of the largest level, ${secondOpinionTolerance} is allowed; nothing was saved, and this plan must not be used`,
      { errors: [{ pointer: at, detail: `largest difference ${opinion.largestDifferenceMgPerL} mg/L at ${opinion.atH} h` }] },
    );
  return opinion;
}
