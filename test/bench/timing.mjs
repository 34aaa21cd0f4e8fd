/**
 * Milliseconds of the quickest of several runs: other work on the machine only ever adds time.
 *
 * @param work   what is measured; its answer is looked at, so that it cannot be left out
 * @param budgetMs how long to go on measuring, after at least `runs` runs
 */
export function bestMs(work, { runs = 7, budgetMs = 600 } = {}) {
  let best = Number.POSITIVE_INFINITY;
  const startedMs = performance.now();
  for (let run = 0; run < runs || performance.now() - startedMs < budgetMs; run++) {
    const beganMs = performance.now();
    const answer = work();
    best = Math.min(best, performance.now() - beganMs);
    if (answer === undefined) throw new Error("a benchmark answered nothing");
  }
  return best;
}

/** Two works measured in turns, so that a busy moment of the machine meets both. */
export function bestOfBothMs(ours, theirs, { rounds = 9, repeats = 3 } = {}) {
  const best = { ours: Number.POSITIVE_INFINITY, theirs: Number.POSITIVE_INFINITY };
  for (let round = 0; round < rounds; round++) {
    best.ours = Math.min(best.ours, bestMs(ours, { runs: repeats, budgetMs: 0 }));
    best.theirs = Math.min(best.theirs, bestMs(theirs, { runs: repeats, budgetMs: 0 }));
  }
  return best;
}

export function quantile(values, share) {
  const sorted = [...values].sort((one, other) => one - other);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
}

/**
 * One line of the table.
 *
 * @param ratio  what the target is about, as a number
 * @param target { atMost } or { atLeast }
 */
export function line(name, { ours, theirs, unit, ratio, target, note = "" }) {
  const holds = "atMost" in target ? ratio <= target.atMost : ratio >= target.atLeast;
  const words = "atMost" in target ? `at most ${target.atMost}` : `at least ${target.atLeast}`;
  return { name, ours, theirs, unit, ratio, target: words, holds, note };
}

/** A line for what this machine cannot measure. */
export function notMeasured(name, why) {
  return { name, why };
}
