import type { RangeMgPerL } from "../contract/dose.ts";
import { crossingsOf } from "../kinetics/crossings.ts";
import { levelsAt } from "../kinetics/levels.ts";
import type { Walk } from "../kinetics/walk.ts";

/**
 * First hour at which the level is within the range: at the start, on rising through `low` without
 * passing `high` in the same step, or on falling back through `high`.
 *
 * @returns elapsed hours; undefined where the level never enters the range
 */
export function firstEntryH(made: Walk, range: RangeMgPerL): number | undefined {
  const atStart = levelsAt(made, [0])[0]!;
  if (atStart >= range.low && atStart <= range.high) return 0;
  const window = { fromH: 0, toH: made.horizonH };
  const rising = crossingsOf(made, range.low, window).filter(({ direction }) => direction === "rising");
  const after = levelsAt(
    made,
    rising.map(({ atH }) => atH),
  );
  const upward = rising.find((_, index) => after[index]! <= range.high);
  const downward = crossingsOf(made, range.high, window).find(({ direction }) => direction === "falling");
  const hours = [upward, downward].flatMap((crossing) => (crossing === undefined ? [] : [crossing.atH]));
  return hours.length === 0 ? undefined : Math.min(...hours);
}
