import type { Dose } from "../contract/dose.ts";
import type { Give } from "../contract/schedule.ts";

/** What is given at an elapsed hour, as the engine takes it. */
export function elapsedDose(give: Give, atH: number, lagH: number): Dose {
  if (give.kind === "absorbed") return { ...give, atH, lagH };
  if (give.kind !== "pump") return { ...give, atH };
  return { kind: "pump", steps: give.steps.map(({ afterH, rateMgPerH }) => ({ atH: atH + afterH, rateMgPerH })) };
}
