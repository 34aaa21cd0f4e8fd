import type { RegimenContent, SecondOpinion } from "../../shared/contract/case.ts";
import { secondOpinionTolerance } from "../../shared/kinetics/second-opinion.ts";
import { fieldPointer } from "../in-field.ts";
import { RequestError } from "../request-errors.ts";
import type { Appraisal } from "./appraise.ts";

/** Appraises one alternative, here or on another thread. */
export type Appraise = (content: RegimenContent) => Promise<Appraisal>;

/**
 * Whether something may be saved: it can be computed, nothing that stops is left without a reason, and
 * two independent calculations agree.
 *
 * @param at where the content stands in the request, such as "#/content"
 * @throws {RequestError} naming each fault
 */
export async function judgeContent(content: RegimenContent, at: string, appraise: Appraise): Promise<SecondOpinion> {
  const appraisal = await appraise(content);
  if (!appraisal.ok) {
    const errors = [{ pointer: fieldPointer(at, "setting/kinetics", appraisal.field), detail: appraisal.problem }];
    throw new RequestError("validation", "one value is not usable", { errors });
  }
  const { open, secondOpinion } = appraisal;
  if (open.length > 0) {
    const errors = open.slice(0, 50).map(({ about, code, text }) => ({
      pointer: about.startsWith("/") ? at + about : at,
      detail: `${text} (${code})`,
    }));
    throw new RequestError("unanswered-cautions", "write a reason for each, or change what raised it", { errors });
  }
  if (!(secondOpinion.relative <= secondOpinionTolerance)) {
    const detail = `largest difference ${secondOpinion.largestDifferenceMgPerL} mg/L at ${secondOpinion.atH} h, ${secondOpinion.relative} of the largest level; allowed ${secondOpinionTolerance}`;
    throw new RequestError("second-opinion", "nothing was saved, and this plan must not be used", {
      errors: [{ pointer: at, detail }],
    });
  }
  return secondOpinion;
}
