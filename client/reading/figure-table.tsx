import { type Figure, isValue } from "../../shared/figures/figure.ts";
import { figureGroups } from "../../shared/figures/figure-rows.ts";
import type { FigureName, Figures } from "../../shared/figures/figures.ts";
import type { Mark, Marks } from "../../shared/figures/judge.ts";
import { sayFigure, sayMoment } from "../../shared/figures/say-figure.ts";
import type { CsvTable } from "./csv-button.tsx";
import "./figure-table.css";

/** One column of the table: an alternative or a revision. */
export interface FigureColumn {
  readonly key: string;
  readonly title: string;
  readonly timeZone: string;
  readonly answer:
    | { readonly ok: true; readonly figures: Figures; readonly marks: Marks }
    | { readonly ok: false; readonly problem: string };
}

interface FigureTableProps {
  readonly caption: string;
  readonly columns: readonly FigureColumn[];
}

/** All figures side by side; what stands out is said in words with a sign, and what is not there says why. */
export function FigureTable({ caption, columns }: FigureTableProps) {
  return (
    <div class="scroll-x" role="region" aria-label={caption} tabIndex={0}>
      <table class="figure-table">
        <caption>{caption}</caption>
        <thead>
          <tr>
            <th scope="col">Figure</th>
            {columns.map(({ key, title }) => (
              <th scope="col" key={key}>
                {title}
              </th>
            ))}
          </tr>
        </thead>
        {columns.some(({ answer }) => !answer.ok) && (
          <tbody>
            <tr>
              <th scope="row">Not computed</th>
              {columns.map(({ key, answer }) => (
                <td key={key} class="figure-problem">
                  {!answer.ok && answer.problem}
                </td>
              ))}
            </tr>
          </tbody>
        )}
        {figureGroups.map(({ title, rows }) => (
          <tbody key={title}>
            <tr class="figure-group">
              <th scope="rowgroup" colSpan={columns.length + 1}>
                {title}
              </th>
            </tr>
            {rows.map(({ name, label, meaning }) => (
              <tr key={name}>
                <th scope="row">
                  {label}
                  <span class="figure-meaning">{meaning}</span>
                </th>
                {columns.map((column) => (
                  <td key={column.key}>
                    {column.answer.ok && (
                      <FigureCell
                        figure={column.answer.figures[name]}
                        marks={column.answer.marks[name] ?? []}
                        timeZone={column.timeZone}
                      />
                    )}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        ))}
      </table>
    </div>
  );
}

function FigureCell({ figure, marks, timeZone }: { figure: Figure; marks: readonly Mark[]; timeZone: string }) {
  if (!isValue(figure)) return <span class="figure-absent">{figure.absent}</span>;
  const moment = sayMoment(figure, timeZone);
  return (
    <>
      <span class="figure-value">{sayFigure(figure)}</span>
      {marks.map(({ kind, words }) => (
        <span key={words} class={`figure-mark figure-${kind}`}>
          <span aria-hidden="true">{kind === "best" ? "★" : "!"}</span> {words}
        </span>
      ))}
      {moment && <span class="figure-moment">{moment}</span>}
      {figure.note && <span class="figure-moment">{figure.note}</span>}
    </>
  );
}

/** The same table for a file: numbers bare, their unit and their time in columns of their own. */
export function figureFile(columns: readonly FigureColumn[]): CsvTable {
  return {
    columns: [
      "Group",
      "Figure",
      ...columns.flatMap(({ title }) => [title, `${title}: unit`, `${title}: when`, `${title}: remark`]),
    ],
    rows: figureGroups.flatMap(({ title, rows }) =>
      rows.map(({ name, label }) => [title, label, ...columns.flatMap((column) => fileCells(column, name))]),
    ),
  };
}

function fileCells({ answer }: FigureColumn, name: FigureName): (string | number)[] {
  if (!answer.ok) return ["", "", "", answer.problem];
  const figure = answer.figures[name];
  if (!isValue(figure)) return ["", "", "", figure.absent];
  const words = (answer.marks[name] ?? []).map((mark) => mark.words);
  return [figure.value, figure.unit, figure.at ?? "", [...words, ...(figure.note ? [figure.note] : [])].join("; ")];
}
