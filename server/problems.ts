import type { ErrorRequestHandler, RequestHandler } from "express";
import type { Logger } from "pino";
import type {
  AlteredRowError,
  DatabaseGoneError,
  KeyReusedError,
  NotFoundError,
  StaleError,
  TooManyAlternativesError,
} from "../db/store-errors.ts";
import type { Problem } from "../shared/contract/problem.ts";
import { DomainError } from "../shared/errors.ts";
import { drain } from "./drain.ts";
import { RequestError, type RequestErrorCode } from "./request-errors.ts";
import { requestIdOf } from "./request-id.ts";
import { silentDescription } from "./silent-description.ts";

type StoreErrorCode = (
  | NotFoundError
  | StaleError
  | TooManyAlternativesError
  | KeyReusedError
  | AlteredRowError
  | DatabaseGoneError
)["code"];
type DriverErrorCode = "storage-full" | "storage-busy" | "storage-failed";
export type ErrorCode = RequestErrorCode | StoreErrorCode | DriverErrorCode | DomainError["code"] | "internal";

/** Every way a request can fail: a new error code does not compile until it has its place here. */
export const problemTable: Readonly<Record<ErrorCode, { readonly status: number; readonly title: string }>> = {
  "malformed-request": { status: 400, title: "The request is not HTTP as this server reads it" },
  "malformed-json": { status: 400, title: "The body is not JSON" },
  "malformed-path": { status: 400, title: "The address cannot be read" },
  "too-deep": { status: 400, title: "The body is nested too deeply" },
  "key-missing": { status: 400, title: "The Idempotency-Key header is missing or is no UUID" },
  "cross-site": { status: 403, title: "Another site may not write here" },
  "not-found": { status: 404, title: "Not here" },
  "no-route": { status: 404, title: "There is nothing at this address" },
  "wrong-method": { status: 405, title: "This cannot be done at this address" },
  "too-slow": { status: 408, title: "The request did not end in time" },
  stale: { status: 409, title: "Somebody saved in between" },
  "too-large": { status: 413, title: "The body is too large" },
  "not-json": { status: 415, title: "The body must be JSON" },
  "wrong-host": { status: 421, title: "The request was meant for another server" },
  validation: { status: 422, title: "Some values are not usable" },
  domain: { status: 422, title: "Some values are not usable" },
  "missing-body": { status: 422, title: "The body is missing" },
  "case-file": { status: 422, title: "The file is not a case file this program can read" },
  "unanswered-cautions": { status: 422, title: "Some cautions need a reason before this can be saved" },
  "second-opinion": { status: 422, title: "Two independent calculations do not agree" },
  "too-many-alternatives": { status: 422, title: "The case has no room for another alternative" },
  "key-reused": { status: 422, title: "The Idempotency-Key was used for another request" },
  "too-many-requests": { status: 429, title: "Too many requests" },
  "headers-too-large": { status: 431, title: "The headers or the address are too long" },
  altered: { status: 500, title: "A stored record is not as it was stored" },
  "too-long": { status: 503, title: "The calculation takes too long" },
  "not-ready": { status: 503, title: "The server cannot answer now" },
  "database-gone": { status: 503, title: "The database file was moved or deleted: nothing was saved" },
  "storage-full": { status: 507, title: "The disk is full: nothing was saved" },
  "storage-busy": { status: 503, title: "Another program holds the database: nothing was saved" },
  "storage-failed": { status: 500, title: "The disk failed: nothing was saved" },
  internal: { status: 500, title: "Something went wrong in the server" },
};

/** Nothing else answered: there is no such address. */
export const noSuchAddress: RequestHandler = () => {
  throw new RequestError("no-route", "check the address; the routes are listed at /api/docs");
};

/**
 * Turns every error into a problem document (RFC 9457). What is not known is a 500 without detail.
 *
 * @param giveUp called when the disk failed: after a failed sync a retry may claim success without the data
 *               being there, so a server that goes on writing would lose what it acknowledges
 */
export function problemHandler(logger: Logger, giveUp: (why: string) => void): ErrorRequestHandler {
  return async (error: unknown, request, response, next) => {
    const { code, detail, errors, headers } = described(error);
    const { status, title } = problemTable[code];
    if (status >= 500)
      logger.error({ requestId: requestIdOf(request), code, error: silentDescription(error) }, "request failed");
    if (code === "storage-failed") giveUp("the disk failed");
    if (response.headersSent) return next(error);
    // Answering before the body was read resets connections that are kept alive.
    await drain(request, response);
    const problem: Problem = {
      type: `/problems/${code}`,
      title,
      status,
      ...(detail !== undefined && { detail }),
      requestId: requestIdOf(request),
      ...(errors.length > 0 && { errors: [...errors] }),
    };
    response.status(status).set(headers).type("application/problem+json").send(JSON.stringify(problem));
  };
}

interface Described {
  readonly code: ErrorCode;
  readonly detail?: string;
  readonly errors: RequestError["errors"];
  readonly headers: RequestError["headers"];
}

function described(error: unknown): Described {
  const code = codeOf(error);
  if (code === "internal" || code === "storage-failed") return { code, errors: [], headers: {} };
  const detail = detailOf(code, error);
  if (error instanceof RequestError) return { code, detail, errors: error.errors, headers: error.headers };
  const errors = error instanceof DomainError ? [{ pointer: `#/${error.field}`, detail: error.message }] : [];
  return { code, detail, errors, headers: {} };
}

function codeOf(error: unknown): ErrorCode {
  if (!(error instanceof Error)) return "internal";
  const own = "code" in error ? String(error.code) : "";
  if (Object.hasOwn(problemTable, own)) return own as ErrorCode;
  if (own === "SQLITE_FULL") return "storage-full";
  if (own.startsWith("SQLITE_BUSY")) return "storage-busy";
  if (/^SQLITE_(IOERR|CORRUPT|READONLY|CANTOPEN)/.test(own)) return "storage-failed";
  // The router of Express throws for an escape that it cannot read.
  return error instanceof URIError || ("status" in error && error.status === 400) ? "malformed-path" : "internal";
}

/** Our own words only: the messages of others quote what somebody typed. */
function detailOf(code: ErrorCode, error: unknown): string {
  const own = error instanceof Error && "code" in error && String(error.code) === code;
  if (own) return (error as Error).message;
  if (code === "storage-full") return "what is there can still be read; make room on the disk and try again";
  if (code === "storage-busy") return "try again with the same Idempotency-Key";
  return "the address has an escape that is not complete or not UTF-8";
}
