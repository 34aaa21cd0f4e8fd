import { type FieldProblem, pointerTo, RequestError } from "./request-errors.ts";

/** The deepest document of the contract is a case file, 12 levels down. */
const deepest = 24;

const code = { quote: 0x22, backslash: 0x5c, bracket: 0x5b, bracketEnd: 0x5d, brace: 0x7b, braceEnd: 0x7d } as const;

interface Place {
  readonly value: unknown;
  readonly key: string | number;
  readonly depth: number;
  readonly above: Place | undefined;
}

/**
 * Refuses what a JSON parser takes and nothing behind it can hold: 40,000 levels of nesting, a key that
 * reaches for the prototype, and text that a database cannot keep as it is (a NUL ends it early there,
 * half a surrogate pair comes back as another sign). Walks with a list of its own, never by recursion.
 *
 * @param text what the body was parsed from; nearly always a glance at it is enough
 * @throws {RequestError}
 */
export function checkJson(body: unknown, text: Buffer): void {
  if (isPlain(text)) return;
  const open: Place[] = [{ value: body, key: "", depth: 0, above: undefined }];
  const errors: FieldProblem[] = [];
  for (let place = open.pop(); place !== undefined && errors.length < 50; place = open.pop()) {
    const { value, depth } = place;
    if (typeof value === "string" && !isKept(value))
      errors.push({ pointer: pointerTo(pathOf(place)), detail: "must not hold a NUL or half a surrogate pair" });
    if (typeof value !== "object" || value === null) continue;
    if (depth >= deepest) throw new RequestError("too-deep", `at most ${deepest} levels are read`);
    for (const key of Array.isArray(value) ? value.keys() : Object.keys(value)) {
      if (key === "__proto__" || (typeof key === "string" && !isKept(key)))
        errors.push({ pointer: pointerTo(pathOf(place)), detail: "has a field name that is not allowed" });
      else open.push({ value: (value as Record<string | number, unknown>)[key], key, depth: depth + 1, above: place });
    }
  }
  if (errors.length > 0) throw new RequestError("validation", "some text cannot be kept as it is", { errors });
}

/**
 * Whether nothing of the kind can be in it. A NUL and half a surrogate pair can only come as an escape:
 * JSON allows no raw NUL, and UTF-8 has no half pairs. Brackets within text do not count.
 */
function isPlain(text: Buffer): boolean {
  if (text.includes("\\u") || text.includes("__proto__")) return false;
  let depth = 0;
  let inText = false;
  for (let at = 0; at < text.length; at++) {
    const byte = text[at]!;
    if (byte === code.quote) inText = !inText;
    else if (inText) at += byte === code.backslash ? 1 : 0;
    else if (byte === code.bracket || byte === code.brace) depth++;
    else if (byte === code.bracketEnd || byte === code.braceEnd) depth--;
    if (depth > deepest) return false;
  }
  return true;
}

function isKept(text: string): boolean {
  return !text.includes("\0") && !/\p{Surrogate}/u.test(text);
}

function pathOf(place: Place): (string | number)[] {
  const path: (string | number)[] = [];
  for (let at: Place = place; at.above !== undefined; at = at.above) path.unshift(at.key);
  return path;
}
