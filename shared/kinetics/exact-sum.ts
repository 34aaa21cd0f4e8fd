/**
 * A running sum without rounding: adding a number and later taking it away leaves exactly what was
 * there before, so rates that have all ended add up to exactly 0. A plain running sum leaves a residue
 * that would go on as a small infusion for ever; summing anew at each event costs their square.
 *
 * The sum is kept as parts that do not overlap in their digits; there are few of them (one or two for
 * numbers of like size), so adding takes constant time in practice.
 *
 * Source: Shewchuk, Adaptive precision floating-point arithmetic, Discrete Comput. Geom. 18 (1997)
 * 305-363, grow-expansion, from memory.
 */
export class ExactSum {
  #parts: number[] = [];

  add(value: number): void {
    let carried = value;
    let kept = 0;
    for (const part of this.#parts) {
      const sum = carried + part;
      const partShare = sum - carried;
      const lost = carried - (sum - partShare) + (part - partShare);
      if (lost !== 0) this.#parts[kept++] = lost;
      carried = sum;
    }
    this.#parts.length = kept;
    if (carried !== 0) this.#parts.push(carried);
  }

  /** The sum, rounded once to a double; exactly 0 when what was added cancels. */
  get value(): number {
    let total = 0;
    // From the smallest part up, so that each addition is exact but the last few.
    for (const part of this.#parts) total += part;
    return total;
  }
}
