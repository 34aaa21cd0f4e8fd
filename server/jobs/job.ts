import type { RegimenContent, Revision } from "../../shared/contract/case.ts";
import type { Question } from "../predictions/answer-question.ts";
import type { SilentDescription } from "../silent-description.ts";

/** Work that takes long enough to be felt by everybody else if it were done on the thread that answers. */
export type Job =
  | { readonly kind: "appraise"; readonly content: RegimenContent }
  | { readonly kind: "answer"; readonly question: Question }
  | { readonly kind: "sheet"; readonly revision: Revision; readonly paper: "A4" | "Letter" };

export interface Order {
  readonly id: number;
  readonly job: Job;
}

export type Result =
  | { readonly id: number; readonly ok: true; readonly value: unknown }
  | { readonly id: number; readonly ok: false; readonly error: SilentDescription };
