import { isUtf8 } from "node:buffer";
import { repeatedFields } from "./repeated-fields.ts";
import { type FieldProblem, pointerTo, RequestError } from "./request-errors.ts";

/** The deepest document of the contract is a case file, 12 levels down. */
const deepest = 24;

const code = { quote: 0x22, backslash: 0x5c, colon: 0x3a } as const;
const opening = new Set([0x5b, 0x7b]);
const closing = new Set([0x5d, 0x7d]);

interface Place {
  readonly value: unknown;
  readonly key: string | number;
  readonly above: Place | undefined;
}

/**
 * Refuses what a JSON parser takes and nothing behind it can hold: bytes that are no UTF-8, 40,000 levels
 * of nesting, a field that is named twice (the parser would keep one of two doses), a key that reaches
 * for the prototype, and text that a database cannot keep as it is (a NUL ends it early there, half a
 * surrogate pair comes back as another sign).
 *
 * @param text what the body was parsed from; nearly always a glance at it is enough
 * @throws {RequestError}
 */
export function checkJson(body: unknown, text: Buffer): void {
  // The parser would put U+FFFD for each byte that it cannot read.
  if (!isUtf8(text)) throw new RequestError("malformed-json", "the body is not UTF-8 text");
  const { depth, fields } = extentOf(text);
  if (depth > deepest) throw new RequestError("too-deep", `at most ${deepest} levels are read`);
  if (fieldsIn(body) !== fields) {
    const errors = repeatedFields(text.toString()).map((path) => ({
      pointer: pointerTo(path),
      detail: "is given more than once in one object",
    }));
    throw new RequestError("validation", "nothing says which of two values is meant", { errors });
  }
  // A NUL and half a surrogate pair can only come as an escape: JSON allows no raw NUL, and UTF-8 has no half pairs.
  if (text.includes("\\u") || text.includes("__proto__")) checkText(body);
}

/** Levels and named fields of a JSON text, known to be valid: brackets and colons outside of strings. */
function extentOf(text: Buffer): { depth: number; fields: number } {
  let level = 0;
  let depth = 0;
  let fields = 0;
  let inText = false;
  for (let at = 0; at < text.length; at++) {
    const byte = text[at]!;
    if (byte === code.quote) inText = !inText;
    else if (inText) at += byte === code.backslash ? 1 : 0;
    else if (byte === code.colon) fields++;
    else if (opening.has(byte)) depth = Math.max(depth, ++level);
    else if (closing.has(byte)) level--;
  }
  return { depth, fields };
}

/** Fields that the parser kept. By recursion, which is safe below the deepest level. */
function fieldsIn(value: unknown): number {
  if (typeof value !== "object" || value === null) return 0;
  if (Array.isArray(value)) return value.reduce<number>((total, inner) => total + fieldsIn(inner), 0);
  const inner = Object.values(value);
  return inner.reduce<number>((total, each) => total + fieldsIn(each), inner.length);
}

function checkText(body: unknown): void {
  const open: Place[] = [{ value: body, key: "", above: undefined }];
  const errors: FieldProblem[] = [];
  for (let place = open.pop(); place !== undefined && errors.length < 50; place = open.pop()) {
    const { value } = place;
    if (typeof value === "string" && !isKept(value))
      errors.push({ pointer: pointerTo(pathOf(place)), detail: "must not hold a NUL or half a surrogate pair" });
    if (typeof value !== "object" || value === null) continue;
    for (const key of Array.isArray(value) ? value.keys() : Object.keys(value)) {
      if (key === "__proto__" || (typeof key === "string" && !isKept(key)))
        errors.push({ pointer: pointerTo(pathOf(place)), detail: "has a field name that is not allowed" });
      else open.push({ value: (value as Record<string | number, unknown>)[key], key, above: place });
    }
  }
  if (errors.length > 0) throw new RequestError("validation", "some text cannot be kept as it is", { errors });
}

function isKept(text: string): boolean {
  return !text.includes("\0") && !/\p{Surrogate}/u.test(text);
}

function pathOf(place: Place): (string | number)[] {
  const path: (string | number)[] = [];
  for (let at: Place = place; at.above !== undefined; at = at.above) path.unshift(at.key);
  return path;
}
