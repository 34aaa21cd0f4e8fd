import { type LimitName, limits } from "../contract/limits.ts";

/** The unit of a quantity as people read it: a slash before h in a rate can be read as a 1. */
export function printedUnit(name: LimitName): string {
  const { unit } = limits[name];
  if (unit === "1/h") return "per h";
  return unit === "mg/h" ? "mg per hour" : unit;
}
