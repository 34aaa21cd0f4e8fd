/** Units that a log may be in elsewhere: read as mg/h or hours they would be wrong by 60 or 1000 times. */
const foreign = new Set(
  [
    "g kg ng pg mcg ug \u00b5g \u03bcg microg microgram micrograms gram grams",
    "l ml dl cl ul \u00b5l \u03bcl liter litre liters litres milliliter millilitre milliliters millilitres",
    "s sec secs second seconds min mins minute minutes ms d day days week weeks",
    "u iu ie unit units mol mmol nmol umol \u00b5mol \u03bcmol meq percent %",
  ]
    .join(" ")
    .split(" "),
);

const hours = ["h", "hr", "hrs", "hour", "hours"];
const milligrams = ["mg", "milligram", "milligrams"];

/** Whether a line names columns: it has words and no number in any script. */
export function isHeading(cells: readonly string[]): boolean {
  return !cells.some((cell) => /\p{N}/u.test(cell)) && cells.some((cell) => /\p{L}/u.test(cell));
}

/** Why a log under this heading cannot be taken for times and rates in mg/h; undefined if it can. */
export function headingProblem(cells: readonly string[]): string | undefined {
  const named = cells.join(", ");
  const words = cells.map(wordsOf);
  if (words.flat().some((word) => foreign.has(word)))
    return `the heading names another unit (${named}): times must be in hours and rates in mg/h`;
  const [first = [], second = []] = words;
  if (first.some((word) => milligrams.includes(word)) || (first.includes("rate") && second.includes("time")))
    return `the heading names the rate first (${named}): the time must come first`;
  if (second.some((word) => milligrams.includes(word)) && !second.some((word) => hours.includes(word)))
    return `the heading names an amount (${named}): rates must be in mg/h`;
  return undefined;
}

function wordsOf(cell: string): string[] {
  return cell.toLowerCase().match(/[\p{L}]+|%/gu) ?? [];
}
