/** How an alternative is told apart: its letter first, its dashes second, its colour last. */
export interface AlternativeLook {
  readonly letter: string;
  /** Name of a colour token. */
  readonly colour: string;
  /** Lengths of line and gap in pixels; none for a solid line. */
  readonly dash: readonly number[];
}

const dashes: readonly (readonly number[])[] = [[], [9, 4], [2, 3], [12, 3, 2, 3], [18, 5], [5, 2, 1, 2, 1, 2]];

/** The look by an alternative's place in the case; a place without one looks like the last. */
export function lookAt(place: number): AlternativeLook {
  const known = Math.min(Math.max(0, place), dashes.length - 1);
  const letter = String.fromCharCode(65 + Math.max(0, place));
  return { letter, colour: `--alternative-${String.fromCharCode(97 + known)}`, dash: dashes[known]! };
}
