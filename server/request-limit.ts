import type { RequestHandler } from "express";
import { rateLimit } from "express-rate-limit";
import { RequestError } from "./request-errors.ts";

/** A generous limit an address, against a page or a script that asks in a loop. */
export function requestLimit(perMinute: number): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    limit: perMinute,
    standardHeaders: false,
    legacyHeaders: false,
    // The proxy headers are not trusted (Express leaves them alone), so that they come is no fault of ours.
    validate: { xForwardedForHeader: false, forwardedHeader: false },
    handler() {
      throw new RequestError("too-many-requests", `at most ${perMinute} requests a minute`, {
        headers: { "Retry-After": "60" },
      });
    },
  });
}
