/** What is left of a value within a cycle: from 0 to below the divisor, for negative values too. */
export function restWithin(value: number, divisor: number): number {
  return value - divisor * Math.floor(value / divisor);
}
