import { advance, stretchAt, type Walk } from "../kinetics/walk.ts";

/** Level in mg/L just before anything that happens at this hour; at hour 0, the level after it. */
export function levelBefore(made: Walk, atH: number): number {
  let low = 0;
  let high = made.count - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (made.untilH[middle]! >= atH) high = middle;
    else low = middle + 1;
  }
  const { state, flow } = stretchAt(made, low);
  return advance(state, flow, Math.max(0, atH - made.fromH[low]!)).amountMg / made.volumeL;
}
