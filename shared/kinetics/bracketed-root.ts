/**
 * Root of a continuous function between two points where its signs differ: inverse quadratic
 * interpolation or the secant where they help, bisection where they do not. Some ten evaluations.
 *
 * @param f       continuous on [low, high], with f(low) and f(high) of opposite signs (or zero at an end)
 * @returns       a point within 4 units in the last place of a change of sign, or where f is exactly zero
 *
 * Source: Brent, Algorithms for Minimization without Derivatives (1973), ch. 4 (zero), from memory.
 */
export function bracketedRoot(f: (x: number) => number, low: number, high: number): number {
  let [before, best, other] = [low, high, low];
  let [fBefore, fBest] = [f(low), f(high)];
  let fOther = fBefore;
  let [step, lastStep] = [high - low, high - low];
  for (let count = 0; count < 200; count++) {
    if (Math.abs(fOther) < Math.abs(fBest)) {
      [before, best, other] = [best, other, best];
      [fBefore, fBest, fOther] = [fBest, fOther, fBest];
    }
    const tolerance = 2 * Number.EPSILON * Math.abs(best);
    const half = (other - best) / 2;
    if (fBest === 0 || Math.abs(half) <= tolerance) return best;
    const offered = interpolated({ before, best, other, fBefore, fBest, fOther });
    const helps =
      Math.abs(fBefore) > Math.abs(fBest) &&
      offered * Math.sign(half) > 0 &&
      Math.abs(offered) < Math.min(1.5 * Math.abs(half) - tolerance / 2, Math.abs(lastStep) / 2);
    [step, lastStep] = helps ? [offered, step] : [half, half];
    [before, fBefore] = [best, fBest];
    best += Math.abs(step) > tolerance ? step : Math.sign(half) * tolerance;
    fBest = f(best);
    if (fBest > 0 === fOther > 0) {
      [other, fOther] = [before, fBefore];
      step = best - before;
      lastStep = step;
    }
  }
  return best;
}

interface Bracket {
  readonly before: number;
  readonly best: number;
  readonly other: number;
  readonly fBefore: number;
  readonly fBest: number;
  readonly fOther: number;
}

/** Step from the best point to the root of the curve through the points: two of them, or three that differ. */
function interpolated({ before, best, other, fBefore, fBest, fOther }: Bracket): number {
  const s = fBest / fBefore;
  if (before === other) return ((other - best) * s) / (s - 1);
  const q = fBefore / fOther;
  const r = fBest / fOther;
  const p = s * ((other - best) * q * (q - r) - (best - before) * (r - 1));
  return -p / ((q - 1) * (r - 1) * (s - 1));
}
