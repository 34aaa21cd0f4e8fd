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
    // The other end of the connection: proxy headers are not trusted, so none of them is looked at or warned of.
    keyGenerator: ({ socket }) => socket.remoteAddress ?? "gone",
    validate: false,
    handler() {
      throw new RequestError("too-many-requests", `at most ${perMinute} requests a minute`, {
        headers: { "Retry-After": "60" },
      });
    },
  });
}
