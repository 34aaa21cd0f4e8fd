import { exposureOf } from "../kinetics/exposure.ts";
import type { Figure } from "./figure.ts";
import { momentAt } from "./moment.ts";
import type { Prepared } from "./prepared.ts";

/**
 * Area under the level over 24 h (or `lengthH`) from a chosen hour.
 *
 * @param fromH elapsed hours from the plan's start
 * @returns     mg·h/L with the instant it starts at; absent where the plan ends before the stretch does
 */
export function areaOver({ content, made }: Prepared, fromH: number, lengthH = 24): Figure {
  const toH = fromH + lengthH;
  if (!(fromH >= 0)) return { absent: "the stretch starts before the plan" };
  if (!(toH <= made.horizonH)) return { absent: "the plan ends before the stretch does" };
  return { value: exposureOf(made, { fromH, toH }).aucMgHPerL, unit: "mg·h/L", ...momentAt(content, fromH) };
}
