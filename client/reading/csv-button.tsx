import { useSignal } from "@preact/signals";
import { standingCaution } from "../../shared/cautions/standing.ts";
import { downloadText } from "./download-text.ts";

/** A table as it goes into a file; every heading names its unit. */
export interface CsvTable {
  readonly columns: readonly string[];
  readonly rows: readonly (readonly (string | number)[])[];
}

interface CsvButtonProps {
  readonly children: string;
  readonly fileName: string;
  /** Made when asked for: a long table costs nothing until then. */
  readonly table: () => CsvTable;
}

/** Downloads a table as CSV. The standing caution travels with the numbers, in a column of its own. */
export function CsvButton({ children, fileName, table }: CsvButtonProps) {
  const failed = useSignal(false);
  const download = async () => {
    failed.value = false;
    try {
      const { writeCsv } = await import("../../shared/csv/write-csv.ts");
      const { columns, rows } = table();
      const withCaution = rows.map((row, index) => [...row, index === 0 ? standingCaution.text : ""]);
      downloadText(fileName, "csv", writeCsv([...columns, "Caution"], withCaution));
    } catch {
      failed.value = true;
    }
  };
  return (
    <>
      <button type="button" class="button" onClick={download}>
        {children}
      </button>
      {failed.value && <span role="alert">The file could not be made; load the page anew and try again.</span>}
    </>
  );
}
