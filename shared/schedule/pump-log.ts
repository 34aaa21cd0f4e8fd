import { limits } from "../contract/limits.ts";
import type { Instant } from "../contract/schedule.ts";
import { readCsv } from "../csv/read-csv.ts";
import { DomainError } from "../errors.ts";
import { readNumber } from "../units/read-number.ts";
import { hoursBetween, toInstant } from "./clock.ts";

export interface PumpLogStep {
  readonly afterH: number;
  readonly rateMgPerH: number;
}

export type PumpLog =
  | { readonly ok: true; readonly steps: readonly PumpLogStep[]; readonly notes: readonly string[] }
  | { readonly ok: false; readonly problems: readonly { readonly line: number; readonly detail: string }[] };

export interface PumpLogSetting {
  readonly timeZone: string;
  /** The order's time: hour 0 of the log. */
  readonly startsAt: Instant;
}

interface Row {
  readonly line: number;
  readonly time: string;
  readonly rate: string;
}

const clockPattern = /^\d{4}-\d\d-\d\d[T ]\d\d:\d\d(:\d\d)?$/;
const [, highestRate] = limits.rateMgPerH.hard;

/**
 * A pump log from a pasted table or a CSV file: a time and a rate in mg/h on each line, the rate holding
 * until the next line, the last one 0. Times are hours after the order's time or local dates and times,
 * one way throughout. Everything doubtful is refused with its line; nothing is guessed.
 */
export function readPumpLog(source: string, setting: PumpLogSetting): PumpLog {
  const table = readCsv(source);
  if (!table.ok) return { ok: false, problems: [{ line: table.line, detail: `the log ${table.detail}` }] };
  const [head] = table.rows;
  if (head === undefined)
    return { ok: false, problems: [{ line: 1, detail: "the log is empty: give lines of time and rate" }] };
  const headed = !/\d/.test(head.cells[0] ?? "");
  const heading = headed ? head.cells.join(" ").toLowerCase() : "";
  if (/ml|microg|µg|mcg/.test(heading))
    return {
      ok: false,
      problems: [
        { line: head.line, detail: `the heading names another unit (${head.cells.join(", ")}): rates must be in mg/h` },
      ],
    };
  return readRows(headed ? table.rows.slice(1) : table.rows, setting);
}

function readRows(rows: readonly { line: number; cells: readonly string[] }[], setting: PumpLogSetting): PumpLog {
  const problems: { line: number; detail: string }[] = [];
  const notes: string[] = [];
  const steps: PumpLogStep[] = [];
  const byClock = clockPattern.test(rows[0]?.cells[0] ?? "");
  for (const { line, cells } of rows) {
    const row = rowOf(line, cells);
    if (typeof row === "string") problems.push({ line, detail: row });
    else {
      const step = stepOf(row, byClock, setting, steps.at(-1)?.afterH, notes);
      if (typeof step === "string") problems.push({ line, detail: step });
      else steps.push(step);
    }
  }
  if (problems.length > 0) return { ok: false, problems };
  const lastLine = rows.at(-1)?.line ?? 1;
  if (steps.length < 2)
    return {
      ok: false,
      problems: [{ line: lastLine, detail: "the log must hold at least two lines: a rate and a stop" }],
    };
  if (steps.at(-1)!.rateMgPerH !== 0)
    return {
      ok: false,
      problems: [
        {
          line: lastLine,
          detail: `the last rate must be 0 mg/h, so that the log says when the pump stopped, got ${steps.at(-1)!.rateMgPerH}`,
        },
      ],
    };
  return { ok: true, steps, notes };
}

function rowOf(line: number, cells: readonly string[]): Row | string {
  const filled = cells.filter((cell, index) => cell !== "" || index < 2);
  if (filled.length > 2)
    return `must hold a time and a rate, got ${cells.length} fields (${cells.join(" | ")}): a decimal comma parts a number in two, write 0.5`;
  const [time = "", rate = ""] = filled;
  if (time === "") return "has no time";
  if (rate === "") return "has no rate: the log has a gap here; write 0 where the pump stood still";
  return { line, time, rate };
}

function stepOf(
  row: Row,
  byClock: boolean,
  setting: PumpLogSetting,
  beforeH: number | undefined,
  notes: string[],
): PumpLogStep | string {
  const afterH = byClock ? clockHours(row, setting, notes) : plainHours(row);
  if (typeof afterH === "string") return afterH;
  if (!(afterH >= 0)) return `the time ${row.time} is before the order's time`;
  if (beforeH !== undefined && !(afterH > beforeH))
    return `the time ${row.time} is not later than the line before it: the log is out of order`;
  const rate = readNumber(row.rate);
  if (!rate.ok) return `the rate ${rate.problem}`;
  if (!(rate.value >= 0 && rate.value <= highestRate))
    return `the rate must be from 0 to ${highestRate} mg/h, got ${row.rate}`;
  return { afterH, rateMgPerH: rate.value };
}

function plainHours({ time }: Row): number | string {
  if (clockPattern.test(time)) return `the time ${time} is a date, while the first line counts hours: keep to one way`;
  const hours = readNumber(time);
  return hours.ok ? hours.value : `the time ${hours.problem}`;
}

function clockHours({ line, time }: Row, { timeZone, startsAt }: PumpLogSetting, notes: string[]): number | string {
  if (!clockPattern.test(time))
    return `the time must be a date and 24-hour time such as 2026-03-29 08:00 like the first line's, got ${time}`;
  try {
    const { instant, resolution } = toInstant(time, timeZone);
    if (resolution === "repeated") notes.push(`line ${line}: ${time} comes twice that day; the first is taken`);
    if (resolution === "skipped")
      notes.push(`line ${line}: ${time} does not exist that day; it is moved later by the gap`);
    return hoursBetween(startsAt, instant);
  } catch (error) {
    if (error instanceof DomainError) return error.message;
    throw error;
  }
}
