import type { RegimenContent } from "../../contract/case.ts";
import { type Prepared, prepare } from "../prepared.ts";
import { changesSection, handKinetics } from "./elimination-steps.ts";
import { steadySection } from "./steady-steps.ts";
import type { ArithmeticSection } from "./step.ts";
import { walkSection } from "./walk-steps.ts";

/**
 * The figures once more, the way a colleague works them out with a hand calculator: each formula with its
 * symbols, then with the numbers put in, then the result. Results are rounded to the digits printed and
 * carried on as printed, so that every line can be redone from the paper alone.
 *
 * @throws {DomainError} if the content cannot be computed
 */
export function workedArithmetic(content: RegimenContent): ArithmeticSection[] {
  return workedArithmeticOf(prepare(content));
}

/** As `workedArithmetic`, for an alternative that is already walked. */
export function workedArithmeticOf(prepared: Prepared): ArithmeticSection[] {
  const hand = handKinetics(prepared.course);
  const changes = changesSection(hand, prepared.course);
  return [
    hand.section,
    ...(changes ? [changes] : []),
    steadySection(hand, prepared.settled, prepared.course.startConcentrationMgPerL),
    walkSection(hand, prepared),
  ];
}
