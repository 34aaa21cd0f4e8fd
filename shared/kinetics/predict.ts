import type { PredictionRequest, PredictionResponse } from "../contract/prediction.ts";
import type { SteadyStateRequest, SteadyStateResponse } from "../contract/steady-state.ts";
import { courseOf } from "./course.ts";
import { exposureOf } from "./exposure.ts";
import { gridTimesH, levelsAt, levelsEvery } from "./levels.ts";
import { remainsAt } from "./remains.ts";
import { steadyState } from "./steady-state.ts";
import { walk } from "./walk.ts";

/**
 * Levels, exposure and, where asked, what remains of each dose. Everything but the cautions.
 *
 * @throws {DomainError} if the request contradicts itself in a way its schema does not see
 */
export function predict(request: PredictionRequest): Omit<PredictionResponse, "cautions"> {
  const course = courseOf(request);
  const made = walk(course);
  const { sampleEveryH, sampleTimesH, rangeMgPerL, remainsAtH } = request;
  const window = request.window ?? { fromH: 0, toH: request.horizonH };
  return {
    timesH: sampleTimesH ?? saidTimes(gridTimesH(request.horizonH, sampleEveryH!)),
    concentrationsMgPerL: plainNumbers(sampleTimesH ? levelsAt(made, sampleTimesH) : levelsEvery(made, sampleEveryH!)),
    exposure: exposureOf(made, window, rangeMgPerL),
    ...(remainsAtH !== undefined && { remains: remainsAt(course, remainsAtH) }),
  };
}

/**
 * Exact metrics of a repeating cycle at steady state, and its curve where asked. Everything but the cautions.
 *
 * @throws {DomainError} if nothing is eliminated over a cycle
 */
export function describeSteadyState(request: SteadyStateRequest): Omit<SteadyStateResponse, "cautions"> {
  const { cycleH, sampleEveryH } = request;
  const { made, ...metrics } = steadyState(courseOf({ ...request, horizonH: cycleH }), request.rangeMgPerL);
  return {
    ...metrics,
    ...(sampleEveryH !== undefined && {
      timesH: saidTimes(gridTimesH(cycleH, sampleEveryH)),
      concentrationsMgPerL: plainNumbers(levelsEvery(made, sampleEveryH)),
    }),
  };
}

/** As an array that JSON writes as one. Array.from takes ten times as long: it asks an iterator for each number. */
function plainNumbers(numbers: Float64Array): number[] {
  const plain = new Array<number>(numbers.length);
  for (let index = 0; index < numbers.length; index++) plain[index] = numbers[index]!;
  return plain;
}

/** Times as a person would write them, 0.3 and not 0.30000000000000004: to a tenth of a billionth of an hour. */
function saidTimes(timesH: Float64Array): number[] {
  const said = plainNumbers(timesH);
  for (let index = 0; index < said.length; index++) said[index] = Math.round(said[index]! * 1e10) / 1e10;
  return said;
}
