import type { Caution } from "../contract/caution.ts";
import { type LimitName, limits } from "../contract/limits.ts";
import { formatQuantity } from "../units/format.ts";
import { printedUnit } from "../units/printed-unit.ts";

/**
 * A value that is accepted but lies outside what is usual: most often a slipped decimal point or another
 * unit. It stops until somebody says why it is right.
 */
export function unusualValue(name: LimitName, value: number, about: string): Caution[] {
  const { label, usual } = limits[name];
  const unit = printedUnit(name);
  const [low, high] = usual;
  // No dose, no rate and no level at the start are usual, though they lie below the lowest usual amount.
  if (value === 0 || (value >= low && value <= high)) return [];
  const side = value < low ? "below" : "above";
  const text = `${label} ${formatQuantity(value, unit, 12)} is ${side} the usual ${formatQuantity(low, "", 12)} to ${formatQuantity(high, unit, 12)}. Check the decimal point and the unit.`;
  return [{ code: "unusual-value", severity: "stop", text, about }];
}
