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
  if (issue.code === "invalid_union") {
    const inner = nearest(issue.errors);
    if (inner !== undefined) return inner.flatMap((each) => problemsOf(each, path, body));
  }
  return [{ pointer: pointerTo(path), detail: detailOf(issue, valueAt(body, path)) }];
}

/** Of the shapes a value might have had, the one it misses by least; none where two are as near. */
function nearest(branches: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  const [best, next] = branches.map((branch) => ({ branch, miss: missOf(branch) })).sort((a, b) => a.miss - b.miss);
  return best === undefined || best.miss === next?.miss ? undefined : best.branch;
}

/** A field that a shape does not know speaks against it more than one with a bad value. */
function missOf(branch: readonly Issue[]): number {
  return branch.reduce((total, issue) => total + (issue.code === "unrecognized_keys" ? 1.5 * issue.keys.length : 1), 0);
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

/** What is allowed, and the value that came, unless the message has it already. */
function detailOf(issue: Issue, value: unknown): string {
  const { code, message } = issue;
  if (/\bgot\b/.test(message)) return message;
  if (value !== undefined) return `${message}${got(issue, value)}`;
  return code === "invalid_type" || code === "invalid_union" || code === "invalid_value"
    ? `is missing: ${message}`
    : message;
}

/** A long value helps nobody, and its length does only where that is what is wrong. */
function got({ code }: Issue, value: unknown): string {
  const isCounted = code === "too_big" || code === "too_small";
  if (Array.isArray(value)) return isCounted ? `, got ${value.length}` : code === "invalid_type" ? ", got a list" : "";
  if (typeof value === "object" && value !== null) return code === "invalid_type" ? ", got an object" : "";
  // JSON has no infinity, but 1e999 is read as one.
  if (typeof value === "number" && !Number.isFinite(value)) return ", got a number too large to hold";
  const text = JSON.stringify(value);
  if (text.length <= 60) return `, got ${text}`;
  return isCounted && typeof value === "string" ? `, got ${value.length}` : "";
}
