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
    timesH: sampleTimesH ?? Array.from(gridTimesH(request.horizonH, sampleEveryH!)),
    concentrationsMgPerL: Array.from(sampleTimesH ? levelsAt(made, sampleTimesH) : levelsEvery(made, sampleEveryH!)),
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
      timesH: Array.from(gridTimesH(cycleH, sampleEveryH)),
      concentrationsMgPerL: Array.from(levelsEvery(made, sampleEveryH)),
    }),
  };
}
