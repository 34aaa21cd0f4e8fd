import type { z } from "zod";
import { CaseAnswer, CaseList, RevisionAnswer, RevisionList, WholeCase } from "../../shared/contract/answers.ts";
import {
  type CaseChange,
  type CaseDraft,
  Regimen,
  type RegimenChange,
  type RegimenDraft,
  type RevisionDraft,
} from "../../shared/contract/case.ts";
import type { Answer } from "./answer.ts";
import { ask } from "./ask.ts";
import { doneWith, keyFor } from "./intention-keys.ts";

export function listCases(archived: "none" | "only"): Promise<Answer<CaseList>> {
  const path = archived === "only" ? "/api/cases?archived=only" : "/api/cases";
  return ask({ method: "GET", path, reader: CaseList });
}

export function loadCase(id: string): Promise<Answer<WholeCase>> {
  return ask({ method: "GET", path: `/api/cases/${id}`, reader: WholeCase });
}

export function makeCase(draft: z.input<typeof CaseDraft>): Promise<Answer<CaseAnswer>> {
  return write("POST", "/api/cases", draft, CaseAnswer);
}

export function changeCase(id: string, change: z.input<typeof CaseChange>): Promise<Answer<CaseAnswer>> {
  return write("PATCH", `/api/cases/${id}`, change, CaseAnswer);
}

/** @param file what was read from the file; the server checks every part of it, hashes included */
export function uploadCase(file: unknown): Promise<Answer<CaseAnswer>> {
  return write("POST", "/api/case-files", file, CaseAnswer);
}

export function makeRegimen(caseId: string, draft: RegimenDraft): Promise<Answer<Regimen>> {
  return write("POST", `/api/cases/${caseId}/regimens`, draft, Regimen);
}

export function changeRegimen(caseId: string, regimenId: string, change: RegimenChange): Promise<Answer<Regimen>> {
  return write("PATCH", `/api/cases/${caseId}/regimens/${regimenId}`, change, Regimen);
}

export function saveRevision(
  caseId: string,
  regimenId: string,
  draft: z.input<typeof RevisionDraft>,
): Promise<Answer<RevisionAnswer>> {
  return write("POST", `/api/cases/${caseId}/regimens/${regimenId}/revisions`, draft, RevisionAnswer);
}

export function listRevisions(caseId: string, regimenId: string): Promise<Answer<RevisionList>> {
  return ask({ method: "GET", path: `/api/cases/${caseId}/regimens/${regimenId}/revisions`, reader: RevisionList });
}

/**
 * A refusal ends the intention as much as success does; only a lost or broken answer leaves it open, so
 * that the next try carries the same key.
 */
async function write<Value>(
  method: "POST" | "PATCH",
  path: string,
  body: unknown,
  reader: z.ZodType<Value>,
): Promise<Answer<Value>> {
  const idempotencyKey = keyFor(path, body);
  const answer = await ask({ method, path, body, idempotencyKey, reader });
  const open = !answer.ok && (answer.failure.kind === "unreachable" || answer.failure.kind === "broken");
  if (!open) doneWith(idempotencyKey);
  return answer;
}
