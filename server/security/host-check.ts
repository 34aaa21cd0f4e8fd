import type { RequestHandler } from "express";
import { RequestError } from "../request-errors.ts";

/**
 * Takes only requests that name this server. A page of another site whose name is made to point to
 * 127.0.0.1 (DNS rebinding) is of the same origin for the browser, but its Host header gives it away.
 */
export function hostCheck(names: readonly string[]): RequestHandler {
  const known = new Set(["localhost", "127.0.0.1", "[::1]", ...names.map(asHost)]);
  return (request, _response, next) => {
    const name = /^(\[[0-9a-f:.]+\]|[a-z0-9.-]+)(:\d{1,5})?$/.exec(request.headers.host?.toLowerCase() ?? "")?.[1];
    if (name === undefined || !known.has(name))
      throw new RequestError("wrong-host", "the Host header does not name this server");
    next();
  };
}

function asHost(name: string): string {
  return name.includes(":") ? `[${name.toLowerCase()}]` : name.toLowerCase();
}
