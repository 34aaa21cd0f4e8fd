import type { Problem } from "../../shared/contract/problem.ts";

/** Why the server did not do what was asked, in words for the page. */
export interface Failure {
  /** "stale": somebody saved in between. "unreachable": no answer came, so it may or may not be done. */
  readonly kind: "refused" | "stale" | "missing" | "unreachable" | "broken";
  readonly title: string;
  readonly detail: string;
  readonly errors: readonly { readonly pointer: string; readonly detail: string }[];
}

export type Answer<Value> =
  | { readonly ok: true; readonly value: Value }
  | { readonly ok: false; readonly failure: Failure };

export function failureOf(status: number, problem: Problem | undefined): Failure {
  return {
    kind: kindOf(status),
    title: problem?.title ?? `The server answered ${status}`,
    detail: problem?.detail ?? "",
    errors: problem?.errors ?? [],
  };
}

export const unreachable: Failure = {
  kind: "unreachable",
  title: "The server cannot be reached",
  detail: "What you typed is kept in this browser. Try again: a repeated save makes no second revision.",
  errors: [],
};

export const unreadable: Failure = {
  kind: "broken",
  title: "The server's answer is not in the expected form",
  detail: "It may be of another version than this page. Load the page again; what you typed is kept in this browser.",
  errors: [],
};

function kindOf(status: number): Failure["kind"] {
  if (status === 404) return "missing";
  if (status === 409 || status === 412) return "stale";
  return status >= 500 ? "broken" : "refused";
}
