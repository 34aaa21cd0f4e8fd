import { Router } from "express";
import { cautionsForPrediction, cautionsForSteadyState } from "../../shared/cautions/gather.ts";
import { PredictionRequest } from "../../shared/contract/prediction.ts";
import { SteadyStateRequest } from "../../shared/contract/steady-state.ts";
import { describeSteadyState, predict } from "../../shared/kinetics/predict.ts";
import { inField } from "../in-field.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read } from "../read.ts";

/** Answers that keep nothing. */
export function predictionRoutes(): Router {
  const router = Router();
  router
    .route("/predictions")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(PredictionRequest, request.body);
      const answer = inField(() => ({ ...predict(asked), cautions: cautionsForPrediction(asked) }));
      refuseNaN(answer.concentrationsMgPerL);
      response.json(answer);
    })
    .all(only("POST"));
  router
    .route("/steady-states")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(SteadyStateRequest, request.body);
      const answer = inField(() => ({ ...describeSteadyState(asked), cautions: cautionsForSteadyState(asked) }));
      refuseNaN(answer.concentrationsMgPerL ?? []);
      response.json(answer);
    })
    .all(only("POST"));
  return router;
}

/** JSON writes NaN as null without a word: a level that is no number must not leave the server. */
function refuseNaN(levels: readonly number[]): void {
  if (!levels.every(Number.isFinite)) throw new Error("a level is not a finite number");
}
