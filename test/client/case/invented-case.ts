import { standingCaution } from "../../../shared/cautions/standing.ts";
import { RevisionAnswer, type WholeCase } from "../../../shared/contract/answers.ts";
import { Case, Regimen, type RegimenContent } from "../../../shared/contract/case.ts";
import { inventedContent } from "../../invented-content.ts";

export const caseId = "00000000-0000-4000-8000-000000000001";
export const regimenId = "00000000-0000-4000-8000-000000000002";

/** An invented case as the server tells it, read by the contract. */
export function inventedCase(change: Partial<Case> = {}): Case {
  const { caseLabel, timeZone, setting } = inventedContent();
  const at = "2026-03-02T07:00:00Z";
  return Case.parse({
    id: caseId,
    version: 1,
    label: caseLabel,
    timeZone,
    notes: "",
    setting,
    archived: false,
    demo: false,
    createdAt: at,
    changedAt: at,
    ...change,
  });
}

/** An invented revision of the one alternative; its hash is of the right shape, not of the content. */
export function inventedRevision(number: number, content: RegimenContent = inventedContent()): RevisionAnswer {
  return RevisionAnswer.parse({
    id: `00000000-0000-4000-8000-0000000000${10 + number}`,
    caseId,
    regimenId,
    number,
    createdAt: "2026-03-02T07:30:00Z",
    reason: "invented",
    preparedBy: "A Tester",
    content,
    contentHash: "0".repeat(64),
    secondOpinion: { largestDifferenceMgPerL: 0, atH: 0, largestLevelMgPerL: 12, relative: 0, points: 10 },
    cautions: [standingCaution],
  });
}

/** The case with its one alternative, saved once. */
export function inventedWholeCase(): WholeCase {
  const regimen = Regimen.parse({
    id: regimenId,
    caseId,
    label: "Every 8 h",
    retired: false,
    createdAt: "2026-03-02T07:00:00Z",
    latestRevisionNumber: 1,
  });
  return { case: inventedCase(), regimens: [{ ...regimen, latest: inventedRevision(1) }], cautions: [standingCaution] };
}
