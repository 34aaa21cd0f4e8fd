import type { z } from "zod";

/** One thing that can be asked of the API: what the OpenAPI document and the readable page are made from. */
export interface Operation {
  readonly method: "get" | "post" | "patch";
  /** As in OpenAPI: "/cases/{caseId}". */
  readonly path: string;
  readonly summary: string;
  readonly description?: string;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  readonly answer: Answer;
  /** Statuses of the problems it can answer with, besides those that every operation has. */
  readonly problems: readonly number[];
}

type Answer =
  | { readonly status: 200 | 201; readonly description: string; readonly schema: z.ZodType }
  | { readonly status: 200; readonly description: string; readonly mediaType: string };

/** "/cases/{caseId}" as Express writes it. */
export function expressPath(path: string): string {
  return path.replaceAll(/\{(\w+)\}/g, ":$1");
}

/** Writes are the operations that keep something: they need a key for retries. */
export function isWrite({ method, answer }: Operation): boolean {
  return method === "patch" || answer.status === 201;
}
