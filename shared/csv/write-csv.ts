import { stringify } from "csv-stringify/browser/esm/sync";
import { guarded } from "./guarded.ts";

/**
 * A table as CSV (RFC 4180: CRLF, quotes where needed) that a spreadsheet takes as data: a text that it
 * would run as a formula gets an apostrophe in front; numbers stay numbers.
 *
 * @param columns headings, each with its unit
 * @param rows    one cell per column
 */
export function writeCsv(columns: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  return stringify([[...columns], ...rows.map((row) => row.map(apart))], {
    escape_formulas: true,
    record_delimiter: "windows",
  });
}

/** A text that begins as a guarded one does gets an apostrophe of its own, so that reading takes off just the guard. */
function apart(cell: string | number): string | number {
  return typeof cell === "string" && guarded.test(cell) ? `'${cell}` : cell;
}
