import type { RegimenWithLatest, RevisionAnswer } from "../../shared/contract/answers.ts";
import type { CautionReason, RegimenContent, RegimenId } from "../../shared/contract/case.ts";
import type { Caution } from "../../shared/contract/caution.ts";
import { type Alternative, contentOf, withAlternative } from "../case/case-document.ts";
import { type CasePage, judge } from "../case/case-page.ts";
import { isAbout } from "./is-about.ts";
import { failedWith, type Outcome, saveDetails, staleWith } from "./save-details.ts";

export interface SaveWords {
  readonly reason: string;
  readonly preparedBy: string;
}

export type SaveOutcome = Outcome | { readonly kind: "saved"; readonly revision: RevisionAnswer };

/**
 * Saves the case's details where they changed, makes the alternative known to the server where it is new,
 * and saves its revision. Every step can be repeated: a lost answer makes nothing twice.
 */
export async function saveAlternative(page: CasePage, key: string, words: SaveWords): Promise<SaveOutcome> {
  page.refused.value = [];
  const details = await saveDetails(page);
  if (details.kind !== "done") return details;
  const known = await knownToServer(page, key);
  if (known.kind !== "done") return known;
  const { saveRevision } = await import("../http/cases-api.ts");
  const document = page.model.document.peek();
  const alternative = document.alternatives.find((each) => each.key === key);
  const content = alternative && contentOf(document, alternative);
  if (alternative?.regimenId === undefined || content === undefined) return known;
  const draft = {
    basedOnNumber: alternative.savedNumber,
    ...words,
    content: readyContent(content, judge(content).cautions),
  };
  const answer = await saveRevision(page.stored.peek().case.id, alternative.regimenId, draft);
  if (!answer.ok) {
    const { failure } = answer;
    return failure.kind === "stale" ? staleWith(page, "revision", failure) : failedWith(page, failure);
  }
  const revision = answer.value;
  takeIn(page, key, alternative, revision);
  return { kind: "saved", revision };
}

/** Only reasons that answer a caution of this content go with it; labels lose the spaces around them. */
function readyContent(content: RegimenContent, cautions: readonly Caution[]): RegimenContent {
  const applies = (reason: CautionReason) =>
    reason.reason.trim() !== "" && cautions.some((caution) => isAbout(caution, reason));
  return {
    ...content,
    caseLabel: content.caseLabel.trim(),
    regimenLabel: content.regimenLabel.trim(),
    cautionReasons: content.cautionReasons.filter(applies).map((each) => ({ ...each, reason: each.reason.trim() })),
  };
}

async function knownToServer(page: CasePage, key: string): Promise<Outcome> {
  const alternative = page.model.document.peek().alternatives.find((each) => each.key === key);
  if (alternative === undefined) return { kind: "done" };
  const label = alternative.label.trim();
  const caseId = page.stored.peek().case.id;
  const { makeRegimen, changeRegimen } = await import("../http/cases-api.ts");
  const known = page.stored.peek().regimens.find(({ id }) => id === alternative.regimenId);
  if (known?.label === label) return { kind: "done" };
  const answer =
    known === undefined ? await makeRegimen(caseId, { label }) : await changeRegimen(caseId, known.id, { label });
  if (!answer.ok) return failedWith(page, answer.failure);
  store(page, { ...known, ...answer.value });
  page.model.rewrite((document) => withAlternative(document, key, (each) => ({ ...each, regimenId: answer.value.id })));
  return { kind: "done" };
}

/** The page's alternative becomes what the server stored: what was typed meanwhile stays on top of it. */
function takeIn(page: CasePage, key: string, sent: Alternative, revision: RevisionAnswer): void {
  const { content, number } = revision;
  page.model.rewrite((document) =>
    withAlternative(document, key, (each) => ({
      ...each,
      savedNumber: number,
      ...(each.label === sent.label && { label: content.regimenLabel }),
      ...(each.cautionReasons === sent.cautionReasons && { cautionReasons: content.cautionReasons }),
    })),
  );
  const known = page.stored.peek().regimens.find(({ id }) => id === revision.regimenId);
  if (known !== undefined) store(page, { ...known, latest: revision, latestRevisionNumber: number });
}

function store(page: CasePage, regimen: RegimenWithLatest): void {
  const { regimens, ...rest } = page.stored.peek();
  const known = regimens.some(({ id }: { id: RegimenId }) => id === regimen.id);
  page.stored.value = {
    ...rest,
    regimens: known ? regimens.map((each) => (each.id === regimen.id ? regimen : each)) : [...regimens, regimen],
  };
}
