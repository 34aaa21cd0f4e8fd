/** A grid of a year every minute would be 10 MB of text, so long ones are written anew each time. */
const longestKept = 20_000;
const mostKept = 16;
const comma = 0x2c;

interface Answer {
  readonly timesH?: readonly number[];
}

/** Writes an answer as JSON; `grid` is what its times follow from, everyH undefined where they were given one by one. */
export type WriteAnswer = (
  answer: Answer,
  grid: { readonly hours: number; readonly everyH: number | undefined },
) => Buffer;

/**
 * JSON with the grid of times written once and kept. Most of the time that an answer takes goes into
 * writing numbers, half of them times that are the same for everybody who asks for 72 h every 0.1 h.
 */
export function answerWriter(): WriteAnswer {
  const kept = new Map<string, Buffer>();
  const headOf = (timesH: readonly number[], key: string) => {
    const known = kept.get(key);
    if (known !== undefined) return known;
    const head = Buffer.from(`{"timesH":${JSON.stringify(timesH)}`);
    if (kept.size >= mostKept) kept.delete(kept.keys().next().value!);
    kept.set(key, head);
    return head;
  };
  return (answer, { hours, everyH }) => {
    const { timesH, ...rest } = answer;
    if (timesH === undefined || everyH === undefined || timesH.length > longestKept)
      return Buffer.from(JSON.stringify(answer));
    return joined(headOf(timesH, `${hours} ${everyH}`), JSON.stringify(rest));
  };
}

/** An object that lacks its end, and the rest of it as an object: the brace between them becomes a comma. */
function joined(head: Buffer, rest: string): Buffer {
  const whole = Buffer.allocUnsafe(head.length + Buffer.byteLength(rest));
  head.copy(whole);
  whole.write(rest, head.length);
  whole[head.length] = comma;
  return whole;
}
