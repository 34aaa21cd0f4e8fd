import { useSignal } from "@preact/signals";
import { curvePoints } from "../../shared/figures/curve-points.ts";
import type { Walk } from "../../shared/kinetics/walk.ts";
import { instantAt, sayClock, toLocal } from "../../shared/schedule/clock.ts";
import { formatHours, formatLevel } from "../../shared/units/format.ts";
import { SelectField } from "../controls/select-field.tsx";
import { lookAt } from "./alternative-look.ts";
import { CsvButton, type CsvTable } from "./csv-button.tsx";
import type { CurveView } from "./curve-view.ts";
import { levelColumns, tableHours } from "./level-rows.ts";
import { predictionOf } from "./predictions.ts";
import { useSettled } from "./use-settled.ts";

const stepsH = ["0.25", "0.5", "1", "2", "4", "6", "12", "24"] as const;

/** A longer table nobody reads on a screen; the file holds all of it. */
const mostRows = 400;

/** Points of the exact curve in a file: a pixel is a minute of a day, so that the shape is kept. */
const filePixels = 1_440;

interface Column {
  readonly name: string;
  readonly made: Walk;
}

/** The table behind the chart: the same levels as numbers, for the part of the plan in view. */
export function LevelTable({ view }: { view: CurveView }) {
  const open = useSignal(false);
  return (
    <details class="behind" onToggle={(event) => (open.value = event.currentTarget.open)}>
      <summary>The levels as a table</summary>
      {open.value && <Levels view={view} />}
    </details>
  );
}

function Levels({ view }: { view: CurveView }) {
  const stepText = useSignal<string>("1");
  const contents = useSettled(view.contents).value;
  const span = view.span.value;
  const window = view.window.value;
  if (span === undefined) return null;
  const columns = columnsOf(contents);
  const stepH = Number(stepText.value);
  const hours = tableHours(window, stepH);
  const shown = hours.slice(0, mostRows);
  const levels = levelColumns(
    columns.map(({ made }) => made),
    shown,
  );
  const clock = (atH: number) => instantAt(span.start, atH, span.timeZone);
  const label = [...contents.values()][0]?.caseLabel ?? "case";
  const tableFile = (): CsvTable => {
    const all = tableHours({ fromH: 0, toH: span.horizonH }, stepH);
    const values = levelColumns(
      columns.map(({ made }) => made),
      all,
    );
    return {
      columns: [
        `Clock time (${span.timeZone})`,
        "Hours into the plan, h",
        ...columns.map(({ name }) => `${name}, mg/L`),
      ],
      rows: all.map((atH, row) => [toLocal(clock(atH), span.timeZone), atH, ...values.map((column) => column[row]!)]),
    };
  };
  const curveFile = (): CsvTable => ({
    columns: ["Alternative", `Instant (${span.timeZone})`, "Hours into the plan, h", "Level, mg/L"],
    rows: columns.flatMap(({ name, made }) =>
      curvePoints(made, { fromH: 0, toH: span.horizonH }, Math.max(filePixels, 4 * made.count)).map(({ x, y }) => [
        name,
        clock(x),
        x,
        y,
      ]),
    ),
  });
  return (
    <>
      <div class="behind-tools">
        <SelectField
          id="table-step"
          label="One row every"
          value={stepText.value}
          choices={stepsH.map((value) => ({ value, label: formatHours(Number(value)) }))}
          onChoice={(value) => (stepText.value = value)}
        />
        <CsvButton fileName={`${label} levels`} table={tableFile}>
          Table of the whole plan as CSV
        </CsvButton>
        <CsvButton fileName={`${label} curve`} table={curveFile}>
          Exact curves as CSV
        </CsvButton>
      </div>
      <div class="scroll-x scroll-y" role="region" aria-label="Levels in view" tabIndex={0}>
        <table>
          <caption>
            Levels in the part of the plan in view; at a bolus the value just after it.
            {hours.length > shown.length &&
              ` The first ${shown.length} of ${hours.length} rows: choose a longer step, zoom in, or take the file.`}
          </caption>
          <thead>
            <tr>
              <th scope="col">Clock time</th>
              <th scope="col">Into the plan</th>
              {columns.map(({ name }) => (
                <th scope="col" key={name}>
                  {name}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {shown.map((atH, row) => (
              <tr key={atH}>
                <th scope="row">{sayClock(clock(atH), span.timeZone)}</th>
                <td class="number">{formatHours(atH)}</td>
                {levels.map((column, index) => (
                  <td class="number" key={columns[index]!.name}>
                    {formatLevel(column[row]!)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </>
  );
}

function columnsOf(contents: CurveView["contents"]["value"]): Column[] {
  return [...contents.values()].flatMap((content, place): Column[] => {
    const prediction = predictionOf(content);
    if (!prediction.ok) return [];
    const name = `${lookAt(place).letter} ${content.regimenLabel}`;
    return [
      { name, made: prediction.given.made },
      ...(prediction.planned ? [{ name: `${name}, as planned`, made: prediction.planned.made }] : []),
    ];
  });
}
