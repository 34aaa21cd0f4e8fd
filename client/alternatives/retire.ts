import type { RegimenWithLatest } from "../../shared/contract/answers.ts";
import type { Alternative } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { alternativeOf } from "../case/document-of-case.ts";
import type { Failure } from "../http/answer.ts";
import { appended, withoutAlternative } from "./alternative-edits.ts";

/**
 * Takes a saved alternative off the page; the server keeps its revisions. It is no undo step: it is a
 * fact on the server, and bringing it back is the way to undo it.
 */
export async function retireAlternative(page: CasePage, { key, regimenId }: Alternative): Promise<Failure | undefined> {
  if (regimenId === undefined) return undefined;
  const failure = await changeRetired(page, regimenId, "retired");
  if (failure === undefined) page.model.rewrite((document) => withoutAlternative(document, key));
  return failure;
}

/** Puts a retired alternative back on the page, as its newest revision has it. */
export async function bringBack(page: CasePage, regimen: RegimenWithLatest): Promise<Failure | undefined> {
  const failure = await changeRetired(page, regimen.id, "in use");
  if (failure === undefined) page.model.rewrite((document) => appended(document, alternativeOf(regimen)));
  return failure;
}

async function changeRetired(
  page: CasePage,
  regimenId: RegimenWithLatest["id"],
  state: "retired" | "in use",
): Promise<Failure | undefined> {
  const { changeRegimen } = await import("../http/cases-api.ts");
  const whole = page.stored.peek();
  const retired = state === "retired";
  const answer = await changeRegimen(whole.case.id, regimenId, { retired });
  if (!answer.ok) return answer.failure;
  const regimens = page.stored.peek().regimens.map((each) => (each.id === regimenId ? { ...each, retired } : each));
  page.stored.value = { ...page.stored.peek(), regimens };
  return undefined;
}
