/**
 * Divided differences of the exponential. Every input of the one-compartment model leaves a level that
 * is a sum of them, and written so they lose no digits where rates meet (ka = k) or vanish (k u = 0).
 *
 * Source: McCurdy, Ng and Parlett, Accurate computation of divided differences of the exponential
 * function, Math. Comp. 43 (1984), from memory.
 */

/** (1 - e^-x) / x for x >= 0. expm1 keeps the digits that 1 - e^-x loses; only x = 0 needs its limit. */
export function phi(x: number): number {
  return x === 0 ? 1 : -Math.expm1(-x) / x;
}

/** exp[-a, -b] = (e^-a - e^-b) / (b - a) for a, b >= 0; e^-a where they meet. */
export function expDifference(a: number, b: number): number {
  return Math.exp(-Math.min(a, b)) * phi(Math.abs(a - b));
}

/** exp[-a, -b, -c], the second divided difference, for a, b, c >= 0; e^-a / 2 where all meet. */
export function expSecondDifference(a: number, b: number, c: number): number {
  const low = Math.min(a, b, c);
  const high = Math.max(a, b, c);
  // Taken before the subtraction, so that a middle value equal to an end stays equal to it.
  const middle = Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
  return Math.exp(-low) * fromZero(middle - low, high - low);
}

/** exp[0, -x, -y] for 0 <= x <= y. Below 1 the series converges fast; above, nothing cancels. */
function fromZero(x: number, y: number): number {
  if (y >= 1) return (phi(x) - expDifference(x, y)) / y;
  let sum = 0;
  let complete = 1; // complete homogeneous polynomial h_n(x, y), with the sign (-1)^n
  let power = 1; // (-x)^n
  let factorial = 2; // (n + 2)!
  for (let n = 0; n < 20; n++) {
    sum += complete / factorial;
    power *= -x;
    complete = power - y * complete;
    factorial *= n + 3;
  }
  return sum;
}
