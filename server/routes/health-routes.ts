import { Router } from "express";
import type { Stores } from "../../db/stores.ts";
import { only } from "../methods.ts";
import { RequestError } from "../request-errors.ts";

/** A whole check reads the whole file; between two of them the last answer stands. */
const checkEveryMs = 60_000;

/** Whether the process lives, and whether its database is open and whole. */
export function healthRoutes({
  stores,
  nowMs,
}: {
  stores: Pick<Stores, "checkInPlace" | "checkWhole" | "milestones">;
  nowMs: () => number;
}): Router {
  const router = Router();
  let checkedAtMs = Number.NEGATIVE_INFINITY;
  router
    .route("/health")
    .get((_request, response) => {
      response.json({ status: "live" });
    })
    .all(only("GET"));
  router
    .route("/ready")
    .get(async (_request, response) => {
      try {
        await stores.checkInPlace();
        await stores.milestones.isReached("any");
        if (!(nowMs() - checkedAtMs < checkEveryMs)) {
          await stores.checkWhole();
          checkedAtMs = nowMs();
        }
      } catch (error) {
        throw new RequestError("not-ready", "the database is closed, gone or damaged", { cause: error });
      }
      response.json({ status: "ready" });
    })
    .all(only("GET"));
  return router;
}
