import type { RequestHandler } from "express";
import type { Logger } from "pino";
import { requestIdOf } from "./request-id.ts";
import { routeOf } from "./route-of.ts";

/**
 * One line a request: when, which route, how it ended, how long it took. No address (its query may hold
 * anything), no body, no header, nothing of a case.
 */
export function requestLog(logger: Logger): RequestHandler {
  return (request, response, next) => {
    const startedAt = performance.now();
    response.once("close", () => {
      logger.info(
        {
          requestId: requestIdOf(request),
          method: request.method,
          route: routeOf(request),
          status: response.statusCode,
          ms: Math.round(performance.now() - startedAt),
          finished: response.writableFinished,
        },
        "request",
      );
    });
    next();
  };
}
