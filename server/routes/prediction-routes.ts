import { type Response, Router } from "express";
import { cautionsForCourse } from "../../shared/cautions/gather.ts";
import type { RangeMgPerL } from "../../shared/contract/dose.ts";
import { PredictionRequest } from "../../shared/contract/prediction.ts";
import { SteadyStateRequest } from "../../shared/contract/steady-state.ts";
import { type Computed, describeSteadyState, predict, saidTimesH } from "../../shared/kinetics/predict.ts";
import { answerWriter, type Times } from "../grid-text.ts";
import { inField } from "../in-field.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read } from "../read.ts";
import { refuseNaN } from "../refuse-nan.ts";

/** Answers that keep nothing. */
export function predictionRoutes(): Router {
  const router = Router();
  const write = answerWriter();
  const answer = (response: Response, computed: Computed<object>, times?: Times, range?: RangeMgPerL) => {
    const { course, made } = computed;
    const cautions = cautionsForCourse({ course, made, ...(range !== undefined && { range }) });
    const rest = { ...computed.answer, cautions };
    const text = write(rest, times);
    refuseNaN(rest, text);
    // What response.send would find out by looking at it.
    response.setHeader("Content-Type", "application/json; charset=utf-8");
    response.setHeader("Content-Length", text.length);
    response.end(text);
  };
  router
    .route("/predictions")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(PredictionRequest, request.body);
      const { horizonH, sampleEveryH, sampleTimesH } = asked;
      const times = sampleTimesH ? { grid: undefined, make: () => sampleTimesH } : grid(horizonH, sampleEveryH!);
      answer(
        response,
        inField(() => predict(asked)),
        times,
        asked.rangeMgPerL,
      );
    })
    .all(only("POST"));
  router
    .route("/steady-states")
    .post(jsonBody("usual"), (request, response) => {
      const asked = read(SteadyStateRequest, request.body);
      const { cycleH, sampleEveryH } = asked;
      // Without a range: that a level is outside it for hours is said of plans, not of one cycle.
      const times = sampleEveryH === undefined ? undefined : grid(cycleH, sampleEveryH);
      answer(
        response,
        inField(() => describeSteadyState(asked)),
        times,
      );
    })
    .all(only("POST"));
  return router;
}

function grid(hours: number, everyH: number): Times {
  return { grid: `${hours} ${everyH}`, make: () => saidTimesH(hours, everyH) };
}
