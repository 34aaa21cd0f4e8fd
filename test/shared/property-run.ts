import fc from "fast-check";

const stated = process.env["EBBLINE_TEST_SEED"];

/** Another seed each run, so that the laws are asked of new cases; EBBLINE_TEST_SEED repeats one. */
export const seed = stated === undefined ? Math.trunc(Math.random() * 2 ** 31) : Number(stated);

let printed = false;

/** Runs a property with the printed seed. A failure also names its shrunk case and path. */
export function checkedBy<Values>(property: fc.IProperty<Values>, options: { readonly runs?: number } = {}): void {
  if (!printed) console.info(`fast-check seed ${seed} (repeat with EBBLINE_TEST_SEED=${seed})`);
  printed = true;
  fc.assert(property, { seed, numRuns: options.runs ?? 200 });
}
