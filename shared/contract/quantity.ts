import { z } from "zod";
import { type LimitName, limits } from "./limits.ts";

/** A finite number within the hard limits of the named quantity; its message names range and unit. */
export function quantity(name: LimitName) {
  const { hard, unit } = limits[name];
  const range = `from ${hard[0]} to ${hard[1]}${unit && ` ${unit}`}`;
  return z
    .number({ error: `must be a number ${range}` })
    .min(hard[0], { error: `must be ${range}` })
    .max(hard[1], { error: `must be ${range}` })
    .meta({ description: unit ? `${limits[name].label}, ${unit}` : limits[name].label });
}

/** Elapsed hours from the plan's start. A dose before the start has no meaning and is refused. */
export const AtH = z
  .number({ error: "must be a number of hours, 0 or more" })
  .min(0, { error: "must be 0 h or later: nothing can be given before the plan starts" })
  .max(limits.horizonH.hard[1], { error: `must be at most ${limits.horizonH.hard[1]} h` });

/** Distance of the points of a curve. */
export const SampleEveryH = z
  .number({ error: "must be a number of hours" })
  .min(1 / 60, { error: "must be at least 1 minute (0.0166667 h)" });
