import { counts, limits } from "../contract/limits.ts";
import type { Instant } from "../contract/schedule.ts";
import { readCsv } from "../csv/read-csv.ts";
import { DomainError } from "../errors.ts";
import { readNumber } from "../units/read-number.ts";
import { hoursBetween, toInstant } from "./clock.ts";
import { headingProblem, isHeading } from "./pump-log-heading.ts";

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
const [, longestH] = limits.horizonH.hard;
/** Ten thousand lines of date and rate are a third of this. */
const mostCharacters = 1_000_000;
/** More tells nobody more. */
const mostProblems = 50;

/**
 * A pump log from a pasted table or a CSV file: a time and a rate in mg/h on each line, the rate holding
 * until the next line, the last one 0. Times are hours after the order's time or local dates and times,
 * one way throughout. Everything doubtful is refused with its line; nothing is guessed.
 */
export function readPumpLog(source: string, setting: PumpLogSetting): PumpLog {
  if (source.length > mostCharacters)
    return refused(1, `the log is longer than ${counts.pumpSteps} lines can be: give the part that this order needs`);
  const table = readCsv(source);
  if (!table.ok) return refused(table.line, `the log ${table.detail}`);
  const [head, ...rest] = table.rows;
  if (head === undefined) return refused(1, "the log is empty: give lines of time and rate");
  if (!isHeading(head.cells)) return readRows(table.rows, setting);
  const problem = headingProblem(head.cells);
  return problem === undefined ? readRows(rest, setting) : refused(head.line, problem);
}

function refused(line: number, detail: string): PumpLog {
  return { ok: false, problems: [{ line, detail }] };
}

function readRows(rows: readonly { line: number; cells: readonly string[] }[], setting: PumpLogSetting): PumpLog {
  const problems: { line: number; detail: string }[] = [];
  const notes: string[] = [];
  const steps: PumpLogStep[] = [];
  const byClock = clockPattern.test(rows[0]?.cells[0] ?? "");
  for (const { line, cells } of rows) {
    if (problems.length >= mostProblems) break;
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
  if (steps.length < 2) return refused(lastLine, "the log must hold at least two lines: a rate and a stop");
  if (steps.length > counts.pumpSteps)
    return refused(lastLine, `the log must hold at most ${counts.pumpSteps} lines, got ${steps.length}`);
  const lastRate = steps.at(-1)!.rateMgPerH;
  if (lastRate !== 0)
    return refused(
      lastLine,
      `the last rate must be 0 mg/h, so that the log says when the pump stopped, got ${lastRate}`,
    );
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
  if (!(afterH <= longestH)) return `the time ${row.time} is more than ${longestH} h after the order's time`;
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
    if (error instanceof DomainError) return `the ${error.message}`;
    throw error;
  }
}
