/** A string, a bracket, or what parts entries; numbers and words need no look. */
const tokens = /"(?:[^"\\]|\\.)*"|[[\]{},]/gs;

/** More tells nobody more. */
const most = 50;

interface Level {
  /** Fields named so far; undefined in a list. */
  readonly named: Set<string> | undefined;
  /** The field or the index that is being read; undefined where a field's name comes next. */
  at: string | number | undefined;
}

/**
 * Fields that a JSON text names more than once in one object, which no parser tells.
 *
 * @param text valid JSON
 * @returns    the path of each
 */
export function repeatedFields(text: string): (string | number)[][] {
  const open: Level[] = [];
  const found: (string | number)[][] = [];
  for (const [token] of text.matchAll(tokens)) {
    const level = open.at(-1);
    if (token === "{") open.push({ named: new Set(), at: undefined });
    else if (token === "[") open.push({ named: undefined, at: 0 });
    else if (token === "}" || token === "]") open.pop();
    else if (level === undefined) continue;
    else if (token === ",") level.at = typeof level.at === "number" ? level.at + 1 : undefined;
    else if (level.named !== undefined && level.at === undefined) {
      const name = JSON.parse(token) as string;
      level.at = name;
      if (level.named.has(name) && found.length < most) found.push(open.map(({ at }) => at!));
      level.named.add(name);
    }
  }
  return found;
}
