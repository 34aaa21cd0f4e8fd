import type { z } from "zod";
import { type FieldProblem, pointerTo } from "./request-errors.ts";

type Issue = z.core.$ZodIssue;

/** More than this tells nobody more, and a body of 10,000 bad doses must not be answered with 10,000 lines. */
const most = 50;

/** Each bad field of a request with its value and what is allowed. */
export function fieldProblems(error: z.ZodError, body: unknown): FieldProblem[] {
  return error.issues.flatMap((issue) => problemsOf(issue, [], body)).slice(0, most);
}

function problemsOf(issue: Issue, above: readonly PropertyKey[], body: unknown): FieldProblem[] {
  const path = [...above, ...issue.path];
  if (issue.code === "unrecognized_keys")
    return issue.keys.map((key) => ({
      pointer: pointerTo([...path, key.slice(0, 100)]),
      detail: "is not a known field",
    }));
  if (issue.code === "invalid_union" && issue.errors.length > 0)
    return nearest(issue.errors).flatMap((inner) => problemsOf(inner, path, body));
  return [{ pointer: pointerTo(path), detail: `${issue.message}${got(issue, valueAt(body, path))}` }];
}

/** Of the shapes a value might have had, the one it misses by least. */
function nearest(branches: readonly (readonly Issue[])[]): readonly Issue[] {
  const miss = (branch: readonly Issue[]) =>
    branch.reduce((total, issue) => total + (issue.code === "unrecognized_keys" ? issue.keys.length : 1), 0);
  return branches.reduce((best, branch) => (miss(branch) < miss(best) ? branch : best));
}

function valueAt(body: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, key) =>
      typeof value === "object" && value !== null && Object.hasOwn(value, key)
        ? (value as Record<PropertyKey, unknown>)[key]
        : undefined,
    body,
  );
}

/** The value that came, unless the message has it already or it is too long to help. */
function got(issue: Issue, value: unknown): string {
  if (/\b(got|received)\b/.test(issue.message)) return "";
  if (value === undefined) return issue.code === "invalid_type" || issue.code === "invalid_union" ? ", is missing" : "";
  if (typeof value === "object" && value !== null) return "";
  const text = JSON.stringify(value);
  return text.length > 60 ? "" : `, got ${text}`;
}
