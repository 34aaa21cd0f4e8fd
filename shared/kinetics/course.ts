import type { Dose, EliminationChange } from "../contract/dose.ts";
import type { Parameters } from "../contract/parameters.ts";
import { DomainError } from "../errors.ts";
import { type Kinetics, resolveKinetics } from "./disposition.ts";
import { ExactSum } from "./exact-sum.ts";

/** Elimination from one hour to the next piece. `ratePerH` = base k (if it still holds) or a set value, plus added. */
export interface EliminationPiece {
  readonly fromH: number;
  readonly ratePerH: number;
  /** What the piece is made of, for sensitivities: k or a fixed k, or a fixed clearance, plus added clearance. */
  readonly base: "base" | "rate" | "clearance";
  readonly clearanceLPerH: number;
}

/** One person, one drug, one train of doses over [0, horizonH]: all the engine needs, as plain data. */
export interface Course {
  readonly kinetics: Kinetics;
  readonly absorptionRatePerH?: number;
  readonly bioavailability: number;
  readonly saltFactor: number;
  readonly startConcentrationMgPerL: number;
  /** First piece at 0; strictly increasing fromH. */
  readonly elimination: readonly EliminationPiece[];
  readonly doses: readonly Dose[];
  readonly horizonH: number;
}

export interface CourseInput {
  readonly parameters: Parameters;
  readonly eliminationChanges?: readonly EliminationChange[];
  readonly startConcentrationMgPerL?: number;
  readonly doses: readonly Dose[];
  readonly horizonH: number;
}

/**
 * A course from what a request or a case states.
 *
 * @throws {DomainError} if the kinetics are not fixed by what is given, or a dose needs ka and none is there
 */
export function courseOf(input: CourseInput): Course {
  const { parameters, doses, horizonH } = input;
  const resolved = resolveKinetics(parameters);
  if (!resolved.ok)
    throw new DomainError(
      resolved.field,
      parameters[resolved.field],
      `such that the kinetics are fixed (${resolved.problem})`,
    );
  if (!(horizonH > 0)) throw new DomainError("horizonH", horizonH, "greater than 0");
  if (parameters.absorptionRatePerH === undefined && doses.some(({ kind }) => kind === "absorbed"))
    throw new DomainError("absorptionRatePerH", undefined, "given, because a dose is absorbed");
  return {
    kinetics: resolved.kinetics,
    ...(parameters.absorptionRatePerH !== undefined && { absorptionRatePerH: parameters.absorptionRatePerH }),
    bioavailability: parameters.bioavailability,
    saltFactor: parameters.saltFactor,
    startConcentrationMgPerL: input.startConcentrationMgPerL ?? 0,
    elimination: eliminationPieces(resolved.kinetics, input.eliminationChanges ?? []),
    doses,
    horizonH,
  };
}

/**
 * Elimination as a staircase. A change of k or CL holds until the next one (the later in the list wins
 * at the same hour); added clearances hold for their span and add up on whatever holds then.
 */
export function eliminationPieces(kinetics: Kinetics, changes: readonly EliminationChange[]): EliminationPiece[] {
  const lasting = changes.filter((change) => !("toH" in change)).sort(byHour);
  const steps = changes.flatMap((change) => ("toH" in change ? addedSteps(change) : [])).sort(byHour);
  const edges = new Set([0, ...[...lasting, ...steps].map(({ fromH }) => fromH)]);
  const addedLPerH = new ExactSum();
  let next = 0;
  let nextStep = 0;
  return [...edges]
    .sort((one, other) => one - other)
    .map((fromH) => {
      while (next < lasting.length && lasting[next]!.fromH <= fromH) next++;
      for (; nextStep < steps.length && steps[nextStep]!.fromH <= fromH; nextStep++)
        addedLPerH.add(steps[nextStep]!.byLPerH);
      return piece(kinetics, fromH, lasting[next - 1], addedLPerH.value);
    });
}

type AddedClearance = Extract<EliminationChange, { readonly toH: number }>;

/** A span of added clearance as a step up and a step down; their sum is exactly 0. */
function addedSteps({ fromH, toH, addedClearanceLPerH }: AddedClearance): { fromH: number; byLPerH: number }[] {
  return [
    { fromH, byLPerH: addedClearanceLPerH },
    { fromH: toH, byLPerH: -addedClearanceLPerH },
  ];
}

function byHour(one: { readonly fromH: number }, other: { readonly fromH: number }): number {
  return one.fromH - other.fromH;
}

function piece(
  kinetics: Kinetics,
  fromH: number,
  holds: EliminationChange | undefined,
  addedLPerH: number,
): EliminationPiece {
  if (holds === undefined)
    return {
      fromH,
      base: "base",
      ratePerH: kinetics.eliminationRatePerH + addedLPerH / kinetics.volumeL,
      clearanceLPerH: addedLPerH,
    };
  if ("eliminationRatePerH" in holds)
    return {
      fromH,
      base: "rate",
      ratePerH: holds.eliminationRatePerH + addedLPerH / kinetics.volumeL,
      clearanceLPerH: addedLPerH,
    };
  const clearanceLPerH = ("clearanceLPerH" in holds ? holds.clearanceLPerH : 0) + addedLPerH;
  return { fromH, base: "clearance", ratePerH: clearanceLPerH / kinetics.volumeL, clearanceLPerH };
}

/** Milligrams of a dose that reach the body in the end: S x amount, and F where it is absorbed. */
export function effectiveMg(course: Course, dose: { readonly kind: string; readonly amountMg: number }): number {
  return course.saltFactor * dose.amountMg * (dose.kind === "absorbed" ? course.bioavailability : 1);
}

/** Elapsed hours at which a dose is given, whenever it reaches the blood. */
export function beginsH(dose: Dose): number {
  return dose.kind === "pump" ? dose.steps[0]!.atH : dose.atH;
}
