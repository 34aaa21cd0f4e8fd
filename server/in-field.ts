import { DomainError } from "../shared/errors.ts";
import { RequestError } from "./request-errors.ts";

const kineticsFields = /^(volumeL|clearanceLPerH|eliminationRatePerH|halfLifeH|absorptionRatePerH|bioavailability|saltFactor|lagH)$/;

/**
 * Runs a calculation and turns what it cannot answer for into a problem of the field that is to blame.
 *
 * @param at       JSON Pointer fragment of what is computed, such as "#/content"
 * @param kinetics path of the kinetic values below it, which the engine names without their place
 */
export function inField<Result>(at: string, kinetics: string, compute: () => Result): Result {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const field = kineticsFields.test(error.field) ? `${kinetics}/${error.field}` : error.field;
    const detail = `must be ${error.allowed}, got ${String(error.value)}`;
    throw new RequestError("validation", "one value is not usable", { errors: [{ pointer: `${at}/${field}`, detail }] });
  }
}
