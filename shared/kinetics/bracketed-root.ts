/**
 * Root of a continuous function between two points where its signs differ: false position by the
 * Illinois rule, with a bisection whenever a step leaves more than half of the bracket.
 *
 * @param f       continuous on [low, high], with f(low) and f(high) of opposite signs (or zero at an end)
 * @returns       the point where the bracket has shrunk to neighbouring numbers, or f is exactly zero
 *
 * Source: Dowell and Jarratt, A modified regula falsi method, BIT 11 (1971) 168-174, from memory.
 */
export function bracketedRoot(f: (x: number) => number, low: number, high: number): number {
  let a = low;
  let b = high;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  for (let step = 0; step < 200; step++) {
    const width = b - a;
    const middle = a + width / 2;
    if (middle <= a || middle >= b) return Math.abs(fa) < Math.abs(fb) ? a : b;
    const secant = a + (width * fa) / (fa - fb);
    const x = secant > a && secant < b && step % 3 !== 2 ? secant : middle;
    const fx = f(x);
    if (fx === 0) return x;
    if (fx > 0 === fa > 0) {
      a = x;
      fa = fx;
      fb /= 2;
    } else {
      b = x;
      fb = fx;
      fa /= 2;
    }
  }
  return a + (b - a) / 2;
}
