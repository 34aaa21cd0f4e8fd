import type { Dose, RangeMgPerL } from "../contract/dose.ts";
import type { Exposure } from "../contract/prediction.ts";
import { DomainError } from "../errors.ts";
import type { Course } from "./course.ts";
import { exposureOf } from "./exposure.ts";
import { advance, type BodyState, stretchAt, type Walk, walkFrom } from "./walk.ts";

/** One cycle of a regimen that has been repeated for ever. */
export interface SteadyState {
  readonly cycleH: number;
  /** The cycle itself, from hour 0 to cycleH. */
  readonly made: Walk;
  readonly exposure: Exposure;
  readonly auc24MgHPerL: number;
  /** (peak - trough) / trough; absent where the trough is 0. */
  readonly swing?: number;
  /** (peak - trough) / average. */
  readonly fluctuation: number;
  /** Area of a cycle at steady state over the area of the first cycle, from nothing; absent where that leaves none. */
  readonly accumulationRatio?: number;
  /** Level at the start of the cycle, before anything given then. */
  readonly startMgPerL: number;
}

/**
 * Steady state of a repeating cycle of any doses, solved and not simulated.
 *
 *     (I - Phi(P)) x = forced(P)
 *
 * Phi carries the state over one cycle without doses; forced is where a cycle from nothing ends. Phi is
 * triangular (the body gives nothing back to the absorption site), so two divisions solve it, with
 * 1 - e^-x written as -expm1(-x). Infusions longer than the cycle and lags that pass its end are folded
 * into it; elimination changes repeat with the cycle.
 *
 * @param course doses with atH in [0, horizonH); horizonH is the length of the cycle
 * @throws {DomainError} if nothing is eliminated over a cycle, or a pump never stops
 *
 * Source: Gibaldi and Perrier, Pharmacokinetics, 2nd ed. (1982), ch. 3, from memory, for single doses.
 */
export function steadyState(course: Course, range?: RangeMgPerL): SteadyState {
  const cycleH = course.horizonH;
  const folded: Course = {
    ...course,
    startConcentrationMgPerL: 0,
    doses: course.doses.flatMap((dose, index) => fold(dose, index, cycleH)),
  };
  const start = solve(folded);
  const made = walkFrom(folded, start);
  const exposure = exposureOf(made, { fromH: 0, toH: cycleH }, range);
  const { peak, trough, averageMgPerL } = exposure;
  const first = exposureOf(walkFrom({ ...course, startConcentrationMgPerL: 0 }, nothing), { fromH: 0, toH: cycleH });
  return {
    cycleH,
    made,
    exposure,
    auc24MgHPerL: averageMgPerL * 24,
    ...(trough.mgPerL > 0 && { swing: (peak.mgPerL - trough.mgPerL) / trough.mgPerL }),
    fluctuation: averageMgPerL > 0 ? (peak.mgPerL - trough.mgPerL) / averageMgPerL : 0,
    ...(first.aucMgHPerL > 0 && { accumulationRatio: exposure.aucMgHPerL / first.aucMgHPerL }),
    startMgPerL: start.amountMg / course.kinetics.volumeL,
  };
}

const nothing: BodyState = { amountMg: 0, depotMg: 0 };

function solve(folded: Course): BodyState {
  const forcedWalk = walkFrom(folded, nothing);
  const forced = endOf(forcedWalk);
  const decay = eliminationOver(forcedWalk);
  if (!(decay > 0))
    throw new DomainError(
      "eliminationRatePerH",
      0,
      "above 0 somewhere in the cycle: without elimination there is no steady state",
    );
  const ka = folded.absorptionRatePerH ?? 0;
  const depotMg = forced.depotMg === 0 ? 0 : forced.depotMg / -Math.expm1(-ka * folded.horizonH);
  const carried = depotMg === 0 ? 0 : endOf(walkFrom({ ...folded, doses: [] }, { amountMg: 0, depotMg })).amountMg;
  return { amountMg: (forced.amountMg + carried) / -Math.expm1(-decay), depotMg };
}

function endOf(made: Walk): BodyState {
  const last = made.count - 1;
  const { state, flow } = stretchAt(made, last);
  return advance(state, flow, made.untilH[last]! - made.fromH[last]!);
}

/** Integral of k over the cycle. */
function eliminationOver(made: Walk): number {
  let total = 0;
  for (let index = 0; index < made.count; index++)
    total += made.eliminationRatePerH[index]! * (made.untilH[index]! - made.fromH[index]!);
  return total;
}

/** One cycle of what a dose looks like when every cycle has it. */
function fold(dose: Dose, index: number, cycleH: number): Dose[] {
  if (dose.kind === "pump") return foldPump(dose.steps, index, cycleH);
  if (!(dose.atH >= 0 && dose.atH < cycleH))
    throw new DomainError(`doses/${index}/atH`, dose.atH, `from 0 to below ${cycleH}`);
  if (dose.kind === "bolus") return [dose];
  if (dose.kind === "absorbed") return [{ ...dose, atH: (dose.atH + dose.lagH) % cycleH, lagH: 0 }];
  return foldRate({ atH: dose.atH, hours: dose.durationH, rateMgPerH: dose.amountMg / dose.durationH }, cycleH);
}

function foldPump(steps: Extract<Dose, { kind: "pump" }>["steps"], index: number, cycleH: number): Dose[] {
  const { rateMgPerH: lastMgPerH } = steps.at(-1)!;
  if (lastMgPerH !== 0)
    throw new DomainError(`doses/${index}/steps`, lastMgPerH, "0 mg/h at the last step, so that the pump stops");
  return steps.slice(1).flatMap((next, step) => {
    const { atH, rateMgPerH } = steps[step]!;
    return rateMgPerH === 0 ? [] : foldRate({ atH: atH % cycleH, hours: next.atH - atH, rateMgPerH }, cycleH);
  });
}

/** A rate that outlasts the cycle runs in several cycles at once: whole cycles as a constant, the rest as a box. */
function foldRate(
  { atH, hours, rateMgPerH }: { atH: number; hours: number; rateMgPerH: number },
  cycleH: number,
): Dose[] {
  const whole = Math.floor(hours / cycleH);
  const restH = hours - whole * cycleH;
  const constant: Dose[] = whole > 0 ? [{ kind: "pump", steps: [{ atH: 0, rateMgPerH: whole * rateMgPerH }] }] : [];
  const box = (fromH: number, toH: number): Dose[] =>
    toH > fromH
      ? [
          {
            kind: "pump",
            steps: [
              { atH: fromH, rateMgPerH },
              { atH: toH, rateMgPerH: 0 },
            ],
          },
        ]
      : [];
  return [...constant, ...box(atH, Math.min(cycleH, atH + restH)), ...box(0, atH + restH - cycleH)];
}
