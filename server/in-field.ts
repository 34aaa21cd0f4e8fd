import { DomainError } from "../shared/errors.ts";
import { RequestError } from "./request-errors.ts";

const kineticsFields =
  /^(volumeL|clearanceLPerH|eliminationRatePerH|halfLifeH|absorptionRatePerH|bioavailability|saltFactor|lagH)$/;

/**
 * Where in a request the field stands that the engine named.
 *
 * @param at       JSON Pointer fragment of what is computed, such as "#/content"; "#" for the whole body
 * @param kinetics path of the kinetic values below it, which the engine names without their place
 */
export function fieldPointer(at: string, kinetics: string, field: string): string {
  return `${at}/${kineticsFields.test(field) ? `${kinetics}/${field}` : field}`;
}

/**
 * Runs a calculation on a whole request body and turns what it cannot answer for into a problem of the
 * field that is to blame.
 */
export function inField<Result>(compute: () => Result): Result {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const detail = `must be ${error.allowed}, got ${String(error.value)}`;
    const errors = [{ pointer: fieldPointer("#", "parameters", error.field), detail }];
    throw new RequestError("validation", "one value is not usable", { errors });
  }
}
