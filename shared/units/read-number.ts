/** What a field says, or why it says nothing that can be used. */
export type ReadNumber =
  | { readonly ok: true; readonly value: number }
  | { readonly ok: false; readonly problem: string };

/**
 * A number as typed, read strictly. A comma could be a decimal or a thousands sign and a bare point is
 * easily overlooked, so both are refused with what to write instead, never guessed.
 *
 * @param text what stands in the field; spaces around it do not count
 */
export function readNumber(text: string): ReadNumber {
  const typed = text.trim();
  if (typed === "") return refused("is empty");
  if (typed.includes(",")) return refused(`must be written without a comma, such as 0.5 or 1000, got ${typed}`);
  if (/^[+-]?\.\d+$/.test(typed))
    return refused(`must have a zero before the point, such as 0${typed.replace(/^[+-]/, "")}, got ${typed}`);
  if (!/^[+-]?\d+(\.\d+)?$/.test(typed)) return refused(`must be a plain number, such as 0.5 or 12, got ${typed}`);
  const value = Number(typed);
  return Number.isFinite(value) ? { ok: true, value } : refused(`must be a smaller number, got ${typed.slice(0, 20)}…`);
}

function refused(problem: string): ReadNumber {
  return { ok: false, problem };
}
