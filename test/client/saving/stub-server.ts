import { vi } from "vitest";

export interface Asked {
  readonly method: string;
  readonly path: string;
  readonly key: string | null;
  readonly body: unknown;
}

type Reply = { readonly status: number; readonly body: unknown } | "no answer";

/**
 * Stands in for the network: hands out the replies in turn and notes what was asked. Call it in a test
 * and undo it with vi.unstubAllGlobals.
 */
export function stubNetwork(replies: Reply[]): Asked[] {
  const asked: Asked[] = [];
  vi.stubGlobal("fetch", async (path: string, init: RequestInit) => {
    const body = typeof init.body === "string" ? JSON.parse(init.body) : undefined;
    asked.push({ method: init.method ?? "GET", path, key: new Headers(init.headers).get("Idempotency-Key"), body });
    const reply = replies.shift();
    if (reply === undefined) throw new Error(`nobody expected ${init.method} ${path}`);
    if (reply === "no answer") throw new TypeError("the network is gone");
    return new Response(JSON.stringify(reply.body), { status: reply.status });
  });
  const kept = new Map<string, string>();
  vi.stubGlobal("localStorage", {
    getItem: (name: string) => kept.get(name) ?? null,
    setItem: (name: string, text: string) => void kept.set(name, text),
    removeItem: (name: string) => void kept.delete(name),
  });
  return asked;
}

/** A problem document (RFC 9457). */
export function problem(status: number, errors: { pointer: string; detail: string }[] = []) {
  return { status, body: { type: "about:blank", title: "Not accepted", status, errors } };
}
