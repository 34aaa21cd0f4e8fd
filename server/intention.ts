import type { Request } from "express";
import { z } from "zod";
import type { Intention } from "../db/once.ts";
import { sealOf } from "../db/seal.ts";
import type { Instant } from "../shared/contract/schedule.ts";
import { RequestError } from "./request-errors.ts";

/**
 * What a client wants written, by its Idempotency-Key and by what it sent.
 *
 * @param at now
 * @throws {RequestError} if the key is missing or is no UUID: without it a retry could write twice
 */
export function intentionOf(request: Request, at: Instant): Intention {
  const key = z.uuid().safeParse(request.get("Idempotency-Key"));
  if (!key.success)
    throw new RequestError("key-missing", "send a new UUID with each write, and the same one with each retry of it");
  const fingerprint = sealOf([request.method, request.baseUrl + request.path, request.body]);
  return { key: key.data.toLowerCase(), fingerprint, at };
}
