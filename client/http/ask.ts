import { Problem } from "../../shared/contract/problem.ts";
import { type Answer, failureOf, unreachable, unreadable } from "./answer.ts";

/** A contract schema, as far as the page needs it. */
interface Reader<Value> {
  safeParse(body: unknown): { readonly success: true; readonly data: Value } | { readonly success: false };
}

export interface Question<Value> {
  readonly method: "GET" | "POST" | "PATCH";
  readonly path: string;
  readonly reader: Reader<Value>;
  readonly body?: unknown;
  /** Made once for one intention, and the same on every retry of it. */
  readonly idempotencyKey?: string;
}

/**
 * One request to our own server. The answer is parsed with the contract, never trusted; nothing is
 * thrown, because the caller has work to keep whatever happens.
 */
export async function ask<Value>(question: Question<Value>): Promise<Answer<Value>> {
  const response = await fetched(question);
  if (response === undefined) return { ok: false, failure: unreachable };
  const body: unknown = await response.json().catch(() => undefined);
  if (!response.ok) return { ok: false, failure: failureOf(response.status, problemOf(body)) };
  const read = question.reader.safeParse(body);
  return read.success ? { ok: true, value: read.data } : { ok: false, failure: unreadable };
}

async function fetched<Value>({ method, path, body, idempotencyKey }: Question<Value>): Promise<Response | undefined> {
  const headers: Record<string, string> = { Accept: "application/json" };
  if (body !== undefined) headers["Content-Type"] = "application/json";
  if (idempotencyKey !== undefined) headers["Idempotency-Key"] = idempotencyKey;
  try {
    return await fetch(path, { method, headers, ...(body !== undefined && { body: JSON.stringify(body) }) });
  } catch {
    return undefined;
  }
}

function problemOf(body: unknown): Problem | undefined {
  const read = Problem.safeParse(body);
  return read.success ? read.data : undefined;
}
