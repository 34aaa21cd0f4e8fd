import { type RequestHandler, Router } from "express";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import type { Calculate, Question } from "../predictions/answer-question.ts";

/** Answers that keep nothing. */
export function predictionRoutes({ calculate }: { readonly calculate: Calculate }): Router {
  const router = Router();
  const answer =
    (kind: Question["kind"]): RequestHandler =>
    async (request, response) => {
      const text = await calculate({ kind, body: request.body });
      // What response.send would find out by looking at it.
      response.setHeader("Content-Type", "application/json; charset=utf-8");
      response.setHeader("Content-Length", text.length);
      response.end(text);
    };
  router.route("/predictions").post(jsonBody("usual"), answer("prediction")).all(only("POST"));
  router.route("/steady-states").post(jsonBody("usual"), answer("steady-state")).all(only("POST"));
  return router;
}
