import type { PredictionRequest, PredictionResponse } from "../contract/prediction.ts";
import type { SteadyStateRequest, SteadyStateResponse } from "../contract/steady-state.ts";
import { type Course, courseOf } from "./course.ts";
import { exposureOf } from "./exposure.ts";
import { gridTimesH, levelsAt, levelsEvery } from "./levels.ts";
import { remainsAt } from "./remains.ts";
import { steadyState } from "./steady-state.ts";
import { type Walk, walk } from "./walk.ts";

/** An answer without its times and cautions, and what it was read from, for the cautions. */
export interface Computed<Answer> {
  readonly course: Course;
  readonly made: Walk;
  readonly answer: Omit<Answer, "timesH" | "cautions">;
}

/**
 * Levels, exposure and, where asked, what remains of each dose.
 *
 * @throws {DomainError} if the request contradicts itself in a way its schema does not see
 */
export function predict(request: PredictionRequest): Computed<PredictionResponse> {
  const course = courseOf(request);
  const made = walk(course);
  const { sampleEveryH, sampleTimesH, rangeMgPerL, remainsAtH } = request;
  const window = request.window ?? { fromH: 0, toH: request.horizonH };
  const answer = {
    concentrationsMgPerL: plainNumbers(sampleTimesH ? levelsAt(made, sampleTimesH) : levelsEvery(made, sampleEveryH!)),
    exposure: exposureOf(made, window, rangeMgPerL),
    ...(remainsAtH !== undefined && { remains: remainsAt(course, remainsAtH) }),
  };
  return { course, made, answer };
}

/**
 * Exact metrics of a repeating cycle at steady state, and its curve where asked.
 *
 * @throws {DomainError} if nothing is eliminated over a cycle
 */
export function describeSteadyState(request: SteadyStateRequest): Computed<SteadyStateResponse> {
  const { cycleH, sampleEveryH } = request;
  const course = courseOf({ ...request, horizonH: cycleH });
  const { made, ...metrics } = steadyState(course, request.rangeMgPerL);
  const answer = {
    ...metrics,
    ...(sampleEveryH !== undefined && { concentrationsMgPerL: plainNumbers(levelsEvery(made, sampleEveryH)) }),
  };
  return { course, made, answer };
}

/** Times of a grid as a person would write them, 0.3 and not 0.30000000000000004: to a tenth of a billionth of an hour. */
export function saidTimesH(hours: number, everyH: number): number[] {
  const said = plainNumbers(gridTimesH(hours, everyH));
  for (let index = 0; index < said.length; index++) said[index] = Math.round(said[index]! * 1e10) / 1e10;
  return said;
}

/** As an array that JSON writes as one. Array.from takes ten times as long: it asks an iterator for each number. */
function plainNumbers(numbers: Float64Array): number[] {
  const plain = new Array<number>(numbers.length);
  for (let index = 0; index < numbers.length; index++) plain[index] = numbers[index]!;
  return plain;
}
