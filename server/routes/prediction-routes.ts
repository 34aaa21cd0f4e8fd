import { Router } from "express";
import { cautionsForPrediction, cautionsForSteadyState } from "../../shared/cautions/gather.ts";
import { PredictionRequest } from "../../shared/contract/prediction.ts";
import { SteadyStateRequest } from "../../shared/contract/steady-state.ts";
import { describeSteadyState, predict } from "../../shared/kinetics/predict.ts";
import { answerWriter } from "../grid-text.ts";
import { inField } from "../in-field.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read } from "../read.ts";
import { refuseNaN } from "../refuse-nan.ts";

/** Answers that keep nothing. */
export function predictionRoutes(): Router {
  const router = Router();
  const write = answerWriter();
  router
    .route("/predictions")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(PredictionRequest, request.body);
      const answer = inField(() => ({ ...predict(asked), cautions: cautionsForPrediction(asked) }));
      const text = write(answer, { hours: asked.horizonH, everyH: asked.sampleEveryH });
      refuseNaN(answer, text);
      response.type("json").send(text);
    })
    .all(only("POST"));
  router
    .route("/steady-states")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(SteadyStateRequest, request.body);
      const answer = inField(() => ({ ...describeSteadyState(asked), cautions: cautionsForSteadyState(asked) }));
      const text = write(answer, { hours: asked.cycleH, everyH: asked.sampleEveryH });
      refuseNaN(answer, text);
      response.type("json").send(text);
    })
    .all(only("POST"));
  return router;
}
