import type { IncomingHttpHeaders } from "node:http";
import express, { type Request, type RequestHandler } from "express";
import { checkJson } from "./json-guard.ts";
import { RequestError } from "./request-errors.ts";

/** A case file holds every revision of a case; anything else is one form's worth. */
export const bodyLimits = { usual: 2 * 1024 * 1024, caseFile: 20 * 1024 * 1024 } as const;

/**
 * Parses the body of a route that takes one. Only application/json: a form of another site cannot send it
 * without asking first, and nothing else is ever guessed at.
 */
export function jsonBody(limit: keyof typeof bodyLimits): RequestHandler {
  const texts = new WeakMap<object, Buffer>();
  const parse = express.json({
    limit: bodyLimits[limit],
    type: "application/json",
    inflate: false,
    strict: false,
    verify: (request, _response, text) => texts.set(request, text),
  });
  return async (request, response, next) => {
    requireJson(request);
    await new Promise<void>((resolve, reject) =>
      parse(request, response, (error: unknown) => (error === undefined ? resolve() : reject(error))),
    );
    // Express leaves the body undefined where there was none, so that reading a field of it would throw.
    const body: unknown = request.body;
    const text = texts.get(request);
    if (body === undefined || text === undefined) throw missingBody();
    checkJson(body, text);
    next();
  };
}

function requireJson(request: Request): void {
  if (!hasBody(request.headers)) throw missingBody();
  const type = request.get("Content-Type") ?? "";
  // JSON between systems is UTF-8 (RFC 8259, 8.1); another encoding could bring in half a surrogate pair.
  if (!/^application\/json(\s*;\s*charset="?utf-8"?)?$/i.test(type.trim()))
    throw new RequestError("not-json", "Content-Type must be application/json, in UTF-8");
}

function hasBody(headers: IncomingHttpHeaders): boolean {
  return headers["transfer-encoding"] !== undefined || (headers["content-length"] ?? "0") !== "0";
}

function missingBody(): RequestError {
  return new RequestError("missing-body", "send the fields as a JSON object with Content-Type: application/json");
}
