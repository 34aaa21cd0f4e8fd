import type { WholeCase } from "../../shared/contract/answers.ts";
import { type CasePage, haveDetailsChanged } from "../case/case-page.ts";
import type { Failure } from "../http/answer.ts";

/** Somebody saved in between: what the server has now, to be looked at before anything is replaced. */
export interface Stale {
  readonly kind: "stale";
  readonly what: "details" | "revision";
  readonly newest: WholeCase;
}

export type Outcome = { readonly kind: "done" } | Stale | { readonly kind: "failed"; readonly failure: Failure };

const done = { kind: "done" } as const;

/** Saves label, notes, time zone and setting where they differ from what the server has. */
export async function saveDetails(page: CasePage): Promise<Outcome> {
  if (!haveDetailsChanged(page)) return done;
  const { label, timeZone, notes, setting } = page.model.document.peek();
  const { changeCase } = await import("../http/cases-api.ts");
  const { id } = page.stored.peek().case;
  const change = {
    version: page.baseVersion.peek(),
    label: label.trim(),
    timeZone,
    notes,
    ...(setting !== undefined && { setting }),
  };
  const answer = await changeCase(id, change);
  if (!answer.ok)
    return answer.failure.kind === "stale"
      ? staleWith(page, "details", answer.failure)
      : failedWith(page, answer.failure);
  if (label !== label.trim()) page.model.rewrite((document) => ({ ...document, label: document.label.trim() }));
  page.baseVersion.value = answer.value.version;
  page.stored.value = { ...page.stored.peek(), case: answer.value };
  return done;
}

/** Loads what made a save stale; where even that fails, the failure of the save is what is told. */
export async function staleWith(page: CasePage, what: Stale["what"], failure: Failure): Promise<Outcome> {
  const { loadCase } = await import("../http/cases-api.ts");
  const newest = await loadCase(page.stored.peek().case.id);
  return newest.ok ? { kind: "stale", what, newest: newest.value } : failedWith(page, failure);
}

/** The server's problems go beside their fields as well as into the summary. */
export function failedWith(page: CasePage, failure: Failure): Outcome {
  page.refused.value = failure.errors;
  return { kind: "failed", failure };
}
