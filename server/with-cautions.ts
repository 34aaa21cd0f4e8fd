import { cautionsForContent } from "../shared/cautions/gather.ts";
import { standingCaution } from "../shared/cautions/standing.ts";
import type { RevisionAnswer } from "../shared/contract/answers.ts";
import type { Revision } from "../shared/contract/case.ts";
import type { Caution } from "../shared/contract/caution.ts";

/** A stored revision as it is answered: with everything to be said about what it holds. */
export function revisionAnswer(revision: Revision): RevisionAnswer {
  return { ...revision, cautions: cautionsForContent(revision.content) };
}

/** An answer that states kinetics or a range but predicts nothing. */
export function withStanding<Answer extends object>(answer: Answer): Answer & { cautions: Caution[] } {
  return { ...answer, cautions: [standingCaution] };
}
