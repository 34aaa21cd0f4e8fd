import type { RequestHandler } from "express";
import { RequestError } from "./request-errors.ts";

/** Stands last on a route: Express by itself would say 404 to a wrong method, and answer OPTIONS. */
export function only(...methods: ("GET" | "POST" | "PATCH")[]): RequestHandler {
  const allow = methods.flatMap((method) => (method === "GET" ? ["GET", "HEAD"] : [method])).join(", ");
  return () => {
    throw new RequestError("wrong-method", `allowed here: ${allow}`, { headers: { Allow: allow } });
  };
}
