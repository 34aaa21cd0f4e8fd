import { type CourseInput, courseOf } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { steadyState } from "../../../shared/kinetics/steady-state.ts";
import { waitUntil } from "../../../shared/kinetics/wait-until.ts";
import { walk } from "../../../shared/kinetics/walk.ts";

/** Questions put to the engine as a textbook puts them. No formula of the model is written here. */

export type Doses = CourseInput["doses"];
type Body = Partial<CourseInput["parameters"]>;

export const bolus = (amountMg: number, atH = 0): Doses[number] => ({ kind: "bolus", atH, amountMg });
export const infusion = (amountMg: number, durationH: number, atH = 0): Doses[number] => ({
  kind: "infusion",
  atH,
  amountMg,
  durationH,
});
export const absorbed = (amountMg: number, atH = 0, lagH = 0): Doses[number] => ({
  kind: "absorbed",
  atH,
  amountMg,
  lagH,
});

/** A rate that goes on to the end of the plan. */
export const running = (rateMgPerH: number): Doses[number] => ({ kind: "pump", steps: [{ atH: 0, rateMgPerH }] });

/** The same dose n times. */
export function repeated(count: number, everyH: number, dose: (atH: number) => Doses[number]): Doses {
  return Array.from({ length: count }, (_, index) => dose(index * everyH));
}

export function inputOf(body: Body, doses: Doses, horizonH: number, more: Partial<CourseInput> = {}): CourseInput {
  return { parameters: { bioavailability: 1, saltFactor: 1, ...body }, doses, horizonH, ...more };
}

/** Levels at ascending times; at a bolus, just after it. */
export function levels(body: Body, doses: Doses, timesH: readonly number[], more: Partial<CourseInput> = {}): number[] {
  return Array.from(levelsAt(walk(courseOf(inputOf(body, doses, timesH.at(-1)! + 1, more))), timesH));
}

export function level(body: Body, doses: Doses, timeH: number, more: Partial<CourseInput> = {}): number {
  return levels(body, doses, [timeH], more)[0]!;
}

/** Level just before anything given at an hour: the trough of a stretch that falls until then. */
export function levelBefore(body: Body, doses: Doses, timeH: number): number {
  const made = walk(courseOf(inputOf(body, doses, timeH)));
  return exposureOf(made, { fromH: timeH * (1 - 1e-9), toH: timeH }).trough.mgPerL;
}

export function exposure(body: Body, doses: Doses, horizonH: number) {
  return exposureOf(walk(courseOf(inputOf(body, doses, horizonH))), { fromH: 0, toH: horizonH });
}

export function cycle(body: Body, doses: Doses, cycleH: number) {
  return steadyState(courseOf(inputOf(body, doses, cycleH)));
}

/** Level at which a constant rate ends up. */
export function plateau(body: Body, rateMgPerH: number): number {
  return cycle(body, [infusion(rateMgPerH, 1)], 1).exposure.averageMgPerL;
}

/** Hours until a level is passed, if nothing more is given. */
export function hoursUntil(
  direction: "below" | "above",
  mgPerL: number,
  body: Body,
  doses: Doses,
  more: Partial<CourseInput> = {},
): number {
  const answer = waitUntil(courseOf(inputOf(body, doses, 1, more)), {
    fromH: 0,
    mgPerL,
    direction,
    meanwhile: "nothing-begins",
  });
  if (answer.kind !== "at") throw new Error(`expected an hour, got ${answer.kind}`);
  return answer.atH;
}
