import { DomainError } from "../errors.ts";

/** A number and its unit must not be torn apart at a line's end. */
const noBreak = "\u00a0";

/** Digits beyond these are what binary arithmetic left behind, not what anybody typed. */
const trustedDigits = 12;

/** Smaller than this a plain decimal is unreadable, and a power of ten is written. */
const smallestPlain = 1e-7;

/**
 * A dose the way the published writing rules ask: no trailing zero, a leading zero, a comma for
 * thousands, "microgram" in words below 1 mg so that decimals are rare, a space before the unit.
 *
 * @param amountMg mg, 0 or more
 * @throws {DomainError} if the amount is not a finite number of 0 or more: such a dose is never printed
 *
 * Source: Joint Commission "Do Not Use" list; ISMP list of error-prone abbreviations; NHS Common User
 * Interface guidance MEDi-014, -041, -044 (unit change, space, thousands).
 */
export function formatDose(amountMg: number): string {
  if (!(Number.isFinite(amountMg) && amountMg >= 0))
    throw new DomainError("amountMg", amountMg, "a finite number, 0 or more");
  const typedMg = Number(amountMg.toPrecision(trustedDigits));
  if (typedMg >= 1 || typedMg === 0) return join(plain(typedMg, trustedDigits), "mg");
  const micrograms = Number((typedMg * 1_000).toPrecision(trustedDigits));
  if (micrograms >= 1) return join(plain(micrograms, trustedDigits), "microgram");
  return join(plain(Number((typedMg * 1_000_000).toPrecision(trustedDigits)), trustedDigits), "nanogram");
}

/**
 * A number with its unit, to some significant digits; digits before the decimal point are never rounded
 * away, and no zero trails.
 *
 * @param unit   as it is printed: "mg/L", "per h", "percent"; "" for a plain factor
 * @param digits significant digits
 * @throws {DomainError} if the value is not finite
 */
export function formatQuantity(value: number, unit: string, digits = 4): string {
  if (!Number.isFinite(value)) throw new DomainError("value", value, "a finite number");
  return join(plain(value, digits), unit);
}

/** A level, to four significant digits. */
export function formatLevel(mgPerL: number): string {
  return formatQuantity(mgPerL, "mg/L");
}

/** A rate. "per" in words: a slash in an instruction can be read as a 1. */
export function formatRate(mgPerH: number): string {
  return `${formatDose(Number(mgPerH.toPrecision(6)))} per${noBreak}hour`;
}

export function formatHours(hours: number): string {
  return formatQuantity(hours, "h");
}

export function formatPercent(percent: number): string {
  return formatQuantity(percent, "percent", 3);
}

/** A length of time as people give it to a pump: "30 min", "1 h 30 min"; odd lengths in hours. */
export function formatDuration(hours: number): string {
  const minutes = Math.round(hours * 60);
  if (!(Math.abs(minutes / 60 - hours) < 1e-9)) return formatQuantity(hours, "h");
  const wholeH = Math.floor(minutes / 60);
  const restMin = minutes - 60 * wholeH;
  const parts = [
    wholeH > 0 && formatQuantity(wholeH, "h"),
    (restMin > 0 || wholeH === 0) && formatQuantity(restMin, "min"),
  ];
  return parts.filter(Boolean).join(" ");
}

function join(number: string, unit: string): string {
  return unit === "" ? number : `${number}${noBreak}${unit}`;
}

function plain(value: number, digits: number): string {
  if (value === 0) return "0";
  const size = Math.abs(value);
  if (size < smallestPlain) return powerOfTen(value, digits);
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  const written = value.toFixed(Math.min(decimals, 100));
  const [whole, fraction = ""] = written.replace("-", "").split(".");
  const trimmed = fraction.replace(/0+$/, "");
  const sign = value < 0 && Number(written) !== 0 ? "-" : "";
  return `${sign}${thousands(whole!)}${trimmed && `.${trimmed}`}`;
}

function thousands(whole: string): string {
  return whole.replace(/\B(?=(\d{3})+$)/g, ",");
}

function powerOfTen(value: number, digits: number): string {
  const [mantissa, exponent] = value.toExponential(digits - 1).split("e");
  const raised = [...exponent!.replace("+", "")]
    .map((sign) => (sign === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(sign)]))
    .join("");
  return `${Number(mantissa)}${noBreak}×${noBreak}10${raised}`;
}
