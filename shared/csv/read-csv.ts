import { CsvError, parse } from "csv-parse/browser/esm/sync";
import { guarded } from "./guarded.ts";

export type CsvTable =
  | { readonly ok: true; readonly rows: readonly { readonly line: number; readonly cells: readonly string[] }[] }
  | { readonly ok: false; readonly line: number; readonly detail: string };

const mostCharacters = 5_000_000;

/**
 * A pasted table or the text of a CSV file, cell by cell: fields parted by commas, semicolons or tabs,
 * whichever stands in its first line. The one apostrophe that guards against formulas is taken off.
 *
 * @param source text of the whole file, decoded as UTF-8; a byte order mark is allowed
 */
export function readCsv(source: string): CsvTable {
  if (source.length > mostCharacters) return { ok: false, line: 1, detail: "is longer than 5 million characters" };
  if (source.includes("\u0000") || source.includes("\ufffd"))
    return { ok: false, line: 1, detail: "is not UTF-8 text: save the file as UTF-8, or paste the table" };
  const text = source.replace(/^\ufeff/, "");
  try {
    const rows: { line: number; cells: string[] }[] = [];
    parse(text, {
      delimiter: delimiterOf(text),
      on_record: (cells: readonly string[], { lines }) => {
        rows.push({ line: lines, cells: cells.map(withoutGuard) });
        return null;
      },
      relax_column_count: true,
      skip_empty_lines: true,
      trim: true,
    });
    return { ok: true, rows };
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    return {
      ok: false,
      line: Number(error["lines"] ?? 1),
      detail: "has a quote that is not closed, or one in the middle of a field",
    };
  }
}

function delimiterOf(text: string): string {
  const first = text.split(/\r?\n/).find((line) => line.trim() !== "") ?? "";
  return ["\t", ";", ","].find((sign) => first.includes(sign)) ?? ",";
}

function withoutGuard(cell: string): string {
  return guarded.test(cell) ? cell.slice(1) : cell;
}
