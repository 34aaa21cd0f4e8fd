import { z } from "zod";
import {
  Case,
  type CaseChange,
  type CaseDraft,
  Regimen,
  type RegimenChange,
  type RegimenDraft,
  Revision,
  type RevisionDraft,
} from "../../shared/contract/case.ts";
import type { Answer } from "./answer.ts";
import { ask } from "./ask.ts";
import { doneWith, keyFor } from "./intention-keys.ts";

const LatestOfRegimen = z.strictObject({ ...Regimen.shape, latest: Revision.exactOptional() });
export type LatestOfRegimen = z.infer<typeof LatestOfRegimen>;
const WholeCase = z.strictObject({ case: Case, regimens: z.array(LatestOfRegimen) });
export type WholeCase = z.infer<typeof WholeCase>;

const CaseList = z.strictObject({ cases: z.array(Case) });
const RevisionList = z.strictObject({ revisions: z.array(Revision) });

export function listCases(archived: "none" | "only"): Promise<Answer<z.infer<typeof CaseList>>> {
  const path = archived === "only" ? "/api/cases?archived=only" : "/api/cases";
  return ask({ method: "GET", path, reader: CaseList });
}

export function loadCase(id: string): Promise<Answer<WholeCase>> {
  return ask({ method: "GET", path: `/api/cases/${id}`, reader: WholeCase });
}

export function makeCase(draft: z.input<typeof CaseDraft>): Promise<Answer<Case>> {
  return write("POST", "/api/cases", draft, Case);
}

export function changeCase(id: string, change: z.input<typeof CaseChange>): Promise<Answer<Case>> {
  return write("PATCH", `/api/cases/${id}`, change, Case);
}

/** @param file what was read from the file; the server checks every part of it, hashes included */
export function uploadCase(file: unknown): Promise<Answer<Case>> {
  return write("POST", "/api/case-files", file, Case);
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
): Promise<Answer<Revision>> {
  return write("POST", `/api/cases/${caseId}/regimens/${regimenId}/revisions`, draft, Revision);
}

export function listRevisions(caseId: string, regimenId: string): Promise<Answer<z.infer<typeof RevisionList>>> {
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
