/** One bad place in a request: a JSON Pointer fragment and what is allowed there. */
export interface FieldProblem {
  readonly pointer: string;
  readonly detail: string;
}

/** What can be wrong with a request, apart from what shared/ and db/ find. */
export type RequestErrorCode =
  | "malformed-request"
  | "headers-too-large"
  | "too-slow"
  | "malformed-json"
  | "malformed-path"
  | "too-deep"
  | "not-json"
  | "missing-body"
  | "too-large"
  | "validation"
  | "case-file"
  | "unanswered-cautions"
  | "second-opinion"
  | "key-missing"
  | "cross-site"
  | "wrong-host"
  | "no-route"
  | "wrong-method"
  | "too-many-requests"
  | "too-long"
  | "not-ready";

interface More {
  readonly errors?: readonly FieldProblem[];
  readonly headers?: Readonly<Record<string, string>>;
  readonly cause?: unknown;
}

/** A request that is not carried out. The message is for its sender and is never logged. */
export class RequestError extends Error {
  readonly code: RequestErrorCode;
  readonly errors: readonly FieldProblem[];
  readonly headers: Readonly<Record<string, string>>;

  constructor(code: RequestErrorCode, message: string, more: More = {}) {
    super(message, more.cause === undefined ? undefined : { cause: more.cause });
    this.name = "RequestError";
    this.code = code;
    this.errors = more.errors ?? [];
    this.headers = more.headers ?? {};
  }
}

/** "#/doses/0/atH": a JSON Pointer (RFC 6901) as a URI fragment. */
export function pointerTo(path: readonly PropertyKey[]): string {
  return [
    "#",
    ...path.map((part) => encodeURIComponent(String(part).replaceAll("~", "~0").replaceAll("/", "~1"))),
  ].join("/");
}
