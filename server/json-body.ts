import type { IncomingHttpHeaders } from "node:http";
import type { Request, RequestHandler } from "express";
import { checkJson } from "./json-guard.ts";
import { readBody } from "./read-body.ts";
import { RequestError } from "./request-errors.ts";

/** A case file holds every revision of a case; anything else is one form's worth. */
export const bodyLimits = { usual: 2 * 1024 * 1024, caseFile: 20 * 1024 * 1024 } as const;

/**
 * Parses the body of a route that takes one. Only application/json: a form of another site cannot send it
 * without asking first, and nothing else is ever guessed at.
 */
export function jsonBody(limit: keyof typeof bodyLimits): RequestHandler {
  return async (request, _response, next) => {
    requireJson(request);
    const bytes = await readBody(request, bodyLimits[limit]);
    if (bytes.length === 0) throw missingBody();
    request.body = parsed(bytes);
    next();
  };
}

function parsed(bytes: Buffer): unknown {
  // Some programs write a byte order mark; it says nothing here (RFC 8259, 8.1).
  const text = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? bytes.subarray(3) : bytes;
  let body: unknown;
  try {
    body = JSON.parse(text.toString());
  } catch {
    // In our own words: the parser's message quotes the body.
    throw new RequestError("malformed-json", "the body ends early or has a character that JSON does not allow there");
  }
  checkJson(body, text);
  return body;
}

function requireJson({ headers }: Request): void {
  if (!hasBody(headers)) throw missingBody();
  // JSON between systems is UTF-8 (RFC 8259, 8.1); another encoding could bring in half a surrogate pair.
  if (!/^\s*application\/json(\s*;\s*charset="?utf-8"?)?\s*$/i.test(headers["content-type"] ?? ""))
    throw new RequestError("not-json", "Content-Type must be application/json, in UTF-8");
  if ((headers["content-encoding"] ?? "identity").toLowerCase() !== "identity")
    throw new RequestError("not-json", "send UTF-8 without compression");
}

function hasBody(headers: IncomingHttpHeaders): boolean {
  return headers["transfer-encoding"] !== undefined || (headers["content-length"] ?? "0") !== "0";
}

function missingBody(): RequestError {
  return new RequestError("missing-body", "send the fields as a JSON object with Content-Type: application/json");
}
