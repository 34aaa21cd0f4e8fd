import { type Course, effectiveMg } from "./course.ts";
import { ExactSum } from "./exact-sum.ts";
import { expDifference, phi } from "./exp-differences.ts";

/**
 * A course cut into stretches on which nothing happens: constant k, constant input, free absorption.
 * Each array holds one number per stretch; states are those just after whatever happens at its start.
 */
export interface Walk {
  readonly volumeL: number;
  /** 0 where nothing is absorbed. */
  readonly absorptionRatePerH: number;
  readonly horizonH: number;
  readonly count: number;
  readonly fromH: Float64Array;
  readonly untilH: Float64Array;
  readonly eliminationRatePerH: Float64Array;
  readonly inputMgPerH: Float64Array;
  readonly amountMg: Float64Array;
  readonly depotMg: Float64Array;
}

/** Amounts in the body and at the absorption site. */
export interface BodyState {
  readonly amountMg: number;
  readonly depotMg: number;
}

interface Event {
  readonly atH: number;
  readonly bolusMg?: number;
  readonly depotMg?: number;
  /** Change of one source's rate. `from` and `to` rather than a difference, so that rates end at exactly 0. */
  readonly source?: number;
  readonly rateMgPerH?: number;
  readonly eliminationRatePerH?: number;
}

/**
 * Walks once through the events of a course.
 *
 *     A(u) = A e^(-k u) + R u phi(k u) + ka D u exp[-k u, -ka u],   D(u) = D e^(-ka u)
 *
 * Cost: events x log(events), for sorting them. Doses that start after the horizon do not appear; a bolus
 * at the horizon does, as a last stretch of no length, so that the level there is the one just after it.
 *
 * @returns stretches that tile [0, horizonH] without gap or overlap
 *
 * Source: Gibaldi and Perrier, Pharmacokinetics, 2nd ed. (1982), ch. 1 and 3, from memory; the divided
 * differences are our rewriting.
 */
export function walk(course: Course): Walk {
  return walkFrom(course, { amountMg: course.startConcentrationMgPerL * course.kinetics.volumeL, depotMg: 0 });
}

/** As `walk`, from a state that was there before anything given at hour 0. */
export function walkFrom(course: Course, start: BodyState): Walk {
  const { horizonH } = course;
  const absorptionRatePerH = course.absorptionRatePerH ?? 0;
  const events = eventsOf(course).filter(
    ({ atH, bolusMg }) => atH < horizonH || (atH === horizonH && bolusMg !== undefined),
  );
  const made = emptyWalk(course, events.length + 1);
  const rates = new RunningRates();
  let { amountMg, depotMg } = start;
  let k = course.elimination[0]!.ratePerH;
  let count = 0;
  for (let index = 0, atH = 0; atH < horizonH || index < events.length; ) {
    for (; index < events.length && events[index]!.atH <= atH; index++) {
      const event = events[index]!;
      amountMg += event.bolusMg ?? 0;
      depotMg += event.depotMg ?? 0;
      if (event.source !== undefined) rates.set(event.source, event.rateMgPerH!);
      k = event.eliminationRatePerH ?? k;
    }
    const untilH = events[index]?.atH ?? horizonH;
    const rateMgPerH = rates.totalMgPerH;
    made.fromH[count] = atH;
    made.untilH[count] = untilH;
    made.eliminationRatePerH[count] = k;
    made.inputMgPerH[count] = rateMgPerH;
    made.amountMg[count] = amountMg;
    made.depotMg[count] = depotMg;
    count++;
    const after = advance({ amountMg, depotMg }, { k, ka: absorptionRatePerH, rateMgPerH }, untilH - atH);
    amountMg = after.amountMg;
    depotMg = after.depotMg;
    atH = untilH;
  }
  return trimmed(made, count);
}

/** What holds on one stretch. */
export interface Flow {
  readonly k: number;
  readonly ka: number;
  readonly rateMgPerH: number;
}

/** The state `hours` later, with nothing but the flow in between. */
export function advance(state: BodyState, flow: Flow, hours: number): BodyState {
  const { k, ka, rateMgPerH } = flow;
  const absorbedMg = state.depotMg === 0 ? 0 : state.depotMg * ka * hours * expDifference(k * hours, ka * hours);
  return {
    amountMg: state.amountMg * Math.exp(-k * hours) + rateMgPerH * hours * phi(k * hours) + absorbedMg,
    depotMg: state.depotMg === 0 ? 0 : state.depotMg * Math.exp(-ka * hours),
  };
}

/** State and flow of a stretch, at its start. */
export function stretchAt(made: Walk, index: number): { state: BodyState; flow: Flow } {
  return {
    state: { amountMg: made.amountMg[index]!, depotMg: made.depotMg[index]! },
    flow: { k: made.eliminationRatePerH[index]!, ka: made.absorptionRatePerH, rateMgPerH: made.inputMgPerH[index]! },
  };
}

function eventsOf(course: Course): Event[] {
  const events: Event[] = course.elimination.map(({ fromH, ratePerH }) => ({
    atH: fromH,
    eliminationRatePerH: ratePerH,
  }));
  course.doses.forEach((dose, source) => {
    if (dose.kind === "bolus") events.push({ atH: dose.atH, bolusMg: effectiveMg(course, dose) });
    else if (dose.kind === "absorbed") events.push({ atH: dose.atH + dose.lagH, depotMg: effectiveMg(course, dose) });
    else if (dose.kind === "infusion") {
      events.push({ atH: dose.atH, source, rateMgPerH: effectiveMg(course, dose) / dose.durationH });
      events.push({ atH: dose.atH + dose.durationH, source, rateMgPerH: 0 });
    } else
      for (const step of dose.steps)
        events.push({ atH: step.atH, source, rateMgPerH: course.saltFactor * step.rateMgPerH });
  });
  // Stable: at one hour, events keep the order of their doses.
  return events.sort((one, other) => one.atH - other.atH);
}

/** Sum of the rates that run now, exact, so that nothing runs on when all of them have ended. */
class RunningRates {
  readonly #rates = new Map<number, number>();
  readonly #sum = new ExactSum();

  set(source: number, rateMgPerH: number): void {
    this.#sum.add(-(this.#rates.get(source) ?? 0));
    this.#sum.add(rateMgPerH);
    if (rateMgPerH === 0) this.#rates.delete(source);
    else this.#rates.set(source, rateMgPerH);
  }

  get totalMgPerH(): number {
    return this.#sum.value;
  }
}

function emptyWalk(course: Course, capacity: number): Walk {
  const numbers = () => new Float64Array(capacity);
  return {
    volumeL: course.kinetics.volumeL,
    absorptionRatePerH: course.absorptionRatePerH ?? 0,
    horizonH: course.horizonH,
    count: 0,
    fromH: numbers(),
    untilH: numbers(),
    eliminationRatePerH: numbers(),
    inputMgPerH: numbers(),
    amountMg: numbers(),
    depotMg: numbers(),
  };
}

function trimmed(made: Walk, count: number): Walk {
  return {
    ...made,
    count,
    fromH: made.fromH.subarray(0, count),
    untilH: made.untilH.subarray(0, count),
    eliminationRatePerH: made.eliminationRatePerH.subarray(0, count),
    inputMgPerH: made.inputMgPerH.subarray(0, count),
    amountMg: made.amountMg.subarray(0, count),
    depotMg: made.depotMg.subarray(0, count),
  };
}
