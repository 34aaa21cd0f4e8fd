import type { Revision } from "../../shared/contract/case.ts";
import { formatLevel } from "../../shared/units/format.ts";

/** How far the second computation, which shares no code with the first, lies from it. */
export function sayOpinion({ secondOpinion }: Revision): string {
  const { largestDifferenceMgPerL, largestLevelMgPerL } = secondOpinion;
  return `Computed a second time by another method: largest difference ${formatLevel(largestDifferenceMgPerL)}, where the largest level is ${formatLevel(largestLevelMgPerL)}.`;
}
