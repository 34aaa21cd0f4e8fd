import type { RegimenContent } from "../../shared/contract/case.ts";
import { type Difference, differencesOf } from "../../shared/figures/differences.ts";
import { CsvButton, type CsvTable } from "../reading/csv-button.tsx";

interface Names {
  readonly before: string;
  readonly after: string;
}

interface DifferencesTableProps {
  readonly before: RegimenContent;
  readonly after: RegimenContent;
  readonly names: Names;
  /** Texts that belong to no content, such as the notes of the case. */
  readonly texts?: readonly Difference[];
}

/** Two contents field by field: only what differs, in words with units. */
export function DifferencesTable({ before, after, names, texts = [] }: DifferencesTableProps) {
  const differences = [...texts.filter((text) => text.before !== text.after), ...differencesOf(before, after)];
  if (differences.length === 0) return <p>Nothing that is computed with differs.</p>;
  return (
    <>
      <div class="scroll-x" role="region" aria-label="What differs" tabIndex={0}>
        <table>
          <thead>
            <tr>
              <th scope="col">What</th>
              <th scope="col">{names.before}</th>
              <th scope="col">{names.after}</th>
            </tr>
          </thead>
          <tbody>
            {differences.map((difference) => (
              <tr key={difference.path}>
                <th scope="row">{difference.label}</th>
                <td>{difference.before || "(absent)"}</td>
                <td>{difference.after || "(absent)"}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <CsvButton fileName={`${names.before} and ${names.after}`} table={() => tableOf(differences, names)}>
        Differences as CSV
      </CsvButton>
    </>
  );
}

function tableOf(differences: readonly Difference[], { before, after }: Names): CsvTable {
  return { columns: ["What", before, after], rows: differences.map((each) => [each.label, each.before, each.after]) };
}
