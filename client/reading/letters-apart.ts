import type { CurvePicture } from "./curve-picture.ts";

/** Room that a letter takes from top to bottom. */
const letterGapPx = 13;

interface PlacedLetter {
  readonly letter: string;
  readonly colour: string;
  y: number;
}

/**
 * The letters at the right ends of the lines, moved apart where ends lie close together, and none above the plot.
 *
 * @param yOf pixels from the top, by level
 */
export function lettersApart(
  { lines }: Pick<CurvePicture, "lines">,
  yOf: (mgPerL: number) => number,
  topPx: number,
): readonly PlacedLetter[] {
  const letters = lines.flatMap(({ letter, points, colour }): PlacedLetter[] => {
    const last = points.at(-1);
    return letter === undefined || last === undefined ? [] : [{ letter, colour, y: yOf(last.y) }];
  });
  letters.sort((one, other) => other.y - one.y);
  letters.forEach((each, index) => {
    const below = letters[index - 1];
    if (below !== undefined) each.y = Math.min(each.y, below.y - letterGapPx);
  });
  letters.toReversed().forEach((each, index) => {
    each.y = Math.max(each.y, topPx + index * letterGapPx);
  });
  return letters;
}
