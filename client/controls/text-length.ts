import { formatQuantity } from "../../shared/units/format.ts";

/** Why a text is too long to be stored; undefined where it is not. Nothing is cut off: that would lose words. */
export function lengthProblem(label: string, text: string, longest: number): string | undefined {
  if (text.length <= longest) return undefined;
  const say = (count: number) => formatQuantity(count, "", 6);
  return `${label} must be at most ${say(longest)} characters, got ${say(text.length)}`;
}
