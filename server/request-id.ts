import type { Request, RequestHandler } from "express";

const ids = new WeakMap<object, string>();

/** Gives each request an id of our own making; one sent by the client could carry anything into the log. */
export function requestIds(makeId: () => string): RequestHandler {
  return (request, response, next) => {
    const id = makeId();
    ids.set(request, id);
    response.set("X-Request-Id", id);
    next();
  };
}

export function requestIdOf(request: Request): string {
  return ids.get(request) ?? "none";
}
