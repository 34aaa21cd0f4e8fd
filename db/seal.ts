import { createHash } from "node:crypto";
import canonicalizeModule from "canonicalize";
import type { Revision } from "../shared/contract/case.ts";

/** The package is CommonJS and its types say "default export": at run time the import is the function itself. */
const canonicalize: unknown = canonicalizeModule;

/** The RFC 8785 form of a JSON value: the same value always gives the same text. */
export function canonicalJson(value: unknown): string {
  const text: unknown = typeof canonicalize === "function" ? canonicalize(value) : undefined;
  if (typeof text !== "string") throw new TypeError("undefined has no JSON form");
  return text;
}

/** SHA-256 of the RFC 8785 form, in lower-case hexadecimal. */
export function sealOf(value: unknown): string {
  return createHash("sha256").update(canonicalJson(value)).digest("hex");
}

/** What a second person checks and signs: the hash of everything that was written down in a revision. */
export function contentHashOf({
  number,
  createdAt,
  reason,
  preparedBy,
  content,
}: Pick<Revision, "number" | "createdAt" | "reason" | "preparedBy" | "content">): string {
  return sealOf({ number, createdAt, reason, preparedBy, content });
}
