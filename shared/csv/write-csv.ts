import { stringify } from "csv-stringify/browser/esm/sync";
import { needsGuard } from "./guarded.ts";

/**
 * A table as CSV (RFC 4180: CRLF, quotes where needed) that a spreadsheet takes as data: a text that it
 * would run as a formula gets an apostrophe in front; numbers stay numbers.
 *
 * @param columns headings, each with its unit
 * @param rows    one cell per column
 */
export function writeCsv(columns: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  return stringify([columns.map(safe), ...rows.map((row) => row.map(safe))], {
    record_delimiter: "windows",
    // A spreadsheet also breaks a line at a lone CR or LF, and in half of Europe a field at a semicolon:
    // what comes after an unquoted one would be a cell of its own, and could be a formula.
    quoted_match: /[;\t\r\n]/,
  });
}

function safe(cell: string | number): string | number {
  return typeof cell === "string" && needsGuard.test(cell) ? `'${cell}` : cell;
}
