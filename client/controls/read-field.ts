import { type LimitName, limits } from "../../shared/contract/limits.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import { readNumber } from "../../shared/units/read-number.ts";

/** What a field says, or why it cannot be used: field, value and what is allowed. */
export type ReadField =
  | { readonly ok: true; readonly value: number }
  | { readonly ok: false; readonly problem: string };

/**
 * The number in a field, within the hard limits of its quantity.
 *
 * @param label what the field is called where the limit's own name would not be understood
 */
export function readLimited(name: LimitName, text: string, label: string = limits[name].label): ReadField {
  const read = readNumber(text);
  if (!read.ok) return { ok: false, problem: `${label} ${read.problem}` };
  const [low, high] = limits[name].hard;
  if (read.value >= low && read.value <= high) return read;
  const say = (value: number) => formatQuantity(value, printedUnit(name), 12);
  return { ok: false, problem: `${label} must be from ${say(low)} to ${say(high)}, got ${say(read.value)}` };
}

/** As `readLimited`, for a field that may stay empty; undefined where it does. */
export function readOptional(name: LimitName, text: string, label?: string): ReadField | undefined {
  return text.trim() === "" ? undefined : readLimited(name, text, label);
}
