import { formatQuantity } from "../../units/format.ts";

/** One line that a colleague can redo on a hand calculator from the numbers printed in it. */
export interface ArithmeticStep {
  readonly title: string;
  /** With symbols, such as "k = CL ÷ V". */
  readonly formula: string;
  /** The right-hand side with numbers and units put in. */
  readonly substituted: string;
  /** The result with its unit, as printed and as later lines use it. */
  readonly result: string;
  readonly unit: string;
  readonly value: number;
  /** What the program has with all its digits, where it has the same figure. */
  readonly program?: number;
}

export interface ArithmeticSection {
  readonly title: string;
  /** What must be known to read the lines, or why there are none. */
  readonly note?: string;
  readonly steps: readonly ArithmeticStep[];
}

/** Digits that are printed and carried on. A line's result is rounded to them before the next line uses it. */
export const carriedDigits = 6;

interface Line {
  readonly title: string;
  readonly formula: string;
  readonly substituted: string;
  readonly value: number;
  readonly unit: string;
  readonly program?: number;
}

/** A line whose result is rounded to the digits printed. */
export function step({ value, ...line }: Line): ArithmeticStep {
  const rounded = carried(value);
  return { ...line, value: rounded, result: put(rounded, line.unit) };
}

export function carried(value: number): number {
  return Number(value.toPrecision(carriedDigits));
}

/** Hours between two times, to a ten-thousandth (0.4 s): a clock has no more. */
export function carriedHours(hours: number): number {
  return Number(hours.toFixed(4));
}

/** A number as it stands in a line: every digit it has, with its unit; a plain factor has none. */
export function put(value: number, unit: string): string {
  return formatQuantity(value, unit, 12);
}
