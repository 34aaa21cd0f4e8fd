import { cautionsForCourse } from "../../shared/cautions/gather.ts";
import type { CourseSubject } from "../../shared/cautions/subject.ts";
import { PredictionRequest } from "../../shared/contract/prediction.ts";
import { SteadyStateRequest } from "../../shared/contract/steady-state.ts";
import { type Computed, describeSteadyState, predict, saidTimesH } from "../../shared/kinetics/predict.ts";
import { answerWriter, type Times } from "../grid-text.ts";
import { inField } from "../in-field.ts";
import { read } from "../read.ts";
import { refuseNaN } from "../refuse-nan.ts";

/** A body as it came, and what it asks for. */
export interface Question {
  readonly kind: "prediction" | "steady-state";
  readonly body: unknown;
}

/** Answers a question; rejects with the error that the question deserves. */
export type Calculate = (question: Question) => Promise<Uint8Array>;

const write = answerWriter();

/**
 * The whole answer to a stateless question, as JSON.
 *
 * @throws whatever the body deserves: the routes' errors, with the path of each bad field
 */
export function answerQuestion({ kind, body }: Question): Buffer {
  return kind === "prediction" ? predicted(read(PredictionRequest, body)) : settled(read(SteadyStateRequest, body));
}

function predicted(asked: PredictionRequest): Buffer {
  const { horizonH, sampleEveryH, sampleTimesH, rangeMgPerL: range, window } = asked;
  const times = sampleTimesH ? { grid: undefined, make: () => sampleTimesH } : grid(horizonH, sampleEveryH!);
  const computed = inField(() => predict(asked));
  const whole = range !== undefined && window === undefined && { exposure: computed.answer.exposure };
  return written(computed, times, { ...(range !== undefined && { range }), ...whole });
}

function settled(asked: SteadyStateRequest): Buffer {
  const { cycleH, sampleEveryH } = asked;
  // Without a range: that a level is outside it for hours is said of plans, not of one cycle.
  return written(
    inField(() => describeSteadyState(asked)),
    sampleEveryH === undefined ? undefined : grid(cycleH, sampleEveryH),
  );
}

function written(
  { answer, course, made }: Computed<object>,
  times?: Times,
  against: Pick<CourseSubject, "range" | "exposure"> = {},
): Buffer {
  const cautions = cautionsForCourse({ course, made, ...against });
  const whole = { ...answer, cautions };
  const text = write(whole, times);
  refuseNaN(whole, text);
  return text;
}

function grid(hours: number, everyH: number): Times {
  return { grid: `${hours} ${everyH}`, make: () => saidTimesH(hours, everyH) };
}
