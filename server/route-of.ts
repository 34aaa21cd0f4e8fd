import type { Request } from "express";

/** The template of the route that took a request, never the address itself. */
export function routeOf(request: Request): string {
  const route = request.route as { path?: unknown } | undefined;
  return typeof route?.path === "string" ? route.path : "none";
}
