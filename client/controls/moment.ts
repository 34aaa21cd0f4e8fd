import { DomainError } from "../../shared/errors.ts";
import { type Resolution, secondInstant, toInstant, toLocal } from "../../shared/schedule/clock.ts";

/**
 * A clock time as it stands in its field. `instant` is kept beside the text because the text alone
 * cannot tell the two 01:30 of an autumn night apart, nor hold seconds.
 */
export interface MomentText {
  readonly text: string;
  readonly instant?: string;
}

export type ReadMoment =
  | { readonly ok: true; readonly instant: string; readonly resolution: Resolution; readonly second?: string }
  | { readonly ok: false; readonly problem: string };

/**
 * The instant that a field means. A kept instant holds as long as the text still says its clock time.
 *
 * @param label the field's name, for the problem
 */
export function readMoment(moment: MomentText, timeZone: string, label: string): ReadMoment {
  const text = moment.text.trim();
  if (text === "")
    return { ok: false, problem: `${label} is empty; write a date and 24-hour time such as 2026-03-29 08:00` };
  try {
    const { instant, resolution } = toInstant(text, timeZone);
    const second = resolution === "repeated" ? secondInstant(text, timeZone) : undefined;
    const kept =
      moment.instant !== undefined && fieldText(moment.instant, timeZone) === text.replace("T", " ").slice(0, 16);
    return { ok: true, instant: kept ? moment.instant : instant, resolution, ...(second !== undefined && { second }) };
  } catch (error) {
    if (error instanceof DomainError) return { ok: false, problem: `${label} must be ${error.allowed}, got ${text}` };
    throw error;
  }
}

/** An instant as a field shows it: "2026-03-29 08:00". */
export function momentText(instant: string, timeZone: string): MomentText {
  return { text: fieldText(instant, timeZone), instant };
}

function fieldText(instant: string, timeZone: string): string {
  return toLocal(instant, timeZone).replace("T", " ");
}
