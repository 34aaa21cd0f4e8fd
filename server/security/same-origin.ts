import type { RequestHandler } from "express";
import { RequestError } from "../request-errors.ts";

/**
 * Refuses writes that a page of another site sends. Browsers say where a request comes from in
 * Sec-Fetch-Site (only to https and loopback) and, with every write, in Origin. A client that sends
 * neither is no browser and carries nobody's session.
 *
 * Source: OWASP ASVS 5.0.0, 3.5.1 to 3.5.3.
 */
export const sameOriginWrites: RequestHandler = (request, _response, next) => {
  const isWrite = !["GET", "HEAD", "OPTIONS"].includes(request.method);
  if (isWrite && !isSameOrigin(request.get("Sec-Fetch-Site"), request.get("Origin"), request.headers.host))
    throw new RequestError("cross-site", "write from the page of this server");
  next();
};

function isSameOrigin(site: string | undefined, origin: string | undefined, host: string | undefined): boolean {
  if (site !== undefined) return site === "same-origin";
  if (origin === undefined) return true;
  return URL.canParse(origin) && new URL(origin).host === host?.toLowerCase();
}
