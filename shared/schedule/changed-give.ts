import type { Give } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";

/**
 * What is given with another amount or duration.
 *
 * @param field path of what asks for the change, for the error
 * @throws {DomainError} if the kind has no such thing: a pump log has no single amount, only an infusion lasts
 */
export function changedGive(
  give: Give,
  change: { readonly amountMg?: number; readonly durationH?: number },
  field: string,
): Give {
  const { amountMg, durationH } = change;
  if (amountMg !== undefined && give.kind === "pump")
    throw new DomainError(`${field}/amountMg`, amountMg, "left out: the amount of a pump log is changed in its steps");
  if (durationH !== undefined && give.kind !== "infusion")
    throw new DomainError(
      `${field}/durationH`,
      durationH,
      `left out: only an infusion has a duration, and this is ${nameOf(give)}`,
    );
  return {
    ...give,
    ...(amountMg !== undefined && { amountMg }),
    ...(durationH !== undefined && { durationH }),
  } as Give;
}

function nameOf(give: Give): string {
  return { bolus: "a bolus", infusion: "an infusion", absorbed: "an absorbed dose", pump: "a pump log" }[give.kind];
}
