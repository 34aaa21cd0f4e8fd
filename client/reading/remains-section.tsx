import { useComputed, useSignal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { sayGiven } from "../../shared/schedule/say-order.ts";
import { formatLevel, formatPercent } from "../../shared/units/format.ts";
import type { CaseModel } from "../case/case-model.ts";
import { CsvButton } from "./csv-button.tsx";
import { sayHour } from "./cursor-words.ts";
import { capital, nameOfDose } from "./dose-words.ts";
import { levelAt, predictionOf } from "./predictions.ts";
import { type Part, partsAt, sayGathered } from "./remains-parts.ts";
import { type PictureSlice, RemainsPicture } from "./remains-picture.tsx";
import { selectedKeyOf } from "./selected.ts";
import { useSettled } from "./use-settled.ts";
import "./remains-section.css";

/** What is left at the cursor of each dose of the selected alternative; the parts add up to the level. */
export function RemainsSection({ model }: { model: CaseModel }) {
  const content = useSettled(useComputed(() => model.contents.value.get(selectedKeyOf(model) ?? ""))).value;
  return (
    <section class="part" aria-labelledby="remains-title">
      <h2 id="remains-title">What remains at the cursor</h2>
      {content === undefined ? (
        <p class="soft">The parts of the level appear here once there is an alternative to predict.</p>
      ) : (
        <Remains content={content} cursorH={model.cursorH.value} />
      )}
    </section>
  );
}

function Remains({ content, cursorH }: { content: RegimenContent; cursorH: number }) {
  const unfolded = useSignal(false);
  const prediction = predictionOf(content);
  if (!prediction.ok) return <p class="readout-problem">Cannot be computed: {prediction.problem}</p>;
  const { start, horizonH } = content.setting.plan;
  const atH = Math.min(Math.max(0, cursorH), horizonH);
  const { shown, gathered, sumMgPerL } = partsAt(prediction.given, atH);
  const gatheredWords = gathered.length > 0 ? sayGathered(gathered, shown) : "";
  const gatheredMgPerL = gathered.reduce((sum, { mgPerL }) => sum + mgPerL, 0);
  const gatheredPercent = gathered.reduce((sum, { percent }) => sum + percent, 0);
  const slices: PictureSlice[] = [
    ...(gathered.length > 0
      ? [{ key: "gathered", label: gatheredWords, short: "rest", percent: gatheredPercent }]
      : []),
    ...shown.map((part) => ({
      key: keyOfPart(part),
      label: nameOf(part, content),
      short: shortNameOf(part),
      percent: part.percent,
    })),
  ];
  const when = sayHour(atH, { start, timeZone: content.timeZone });
  const file = () => ({
    columns: ["Part of the level", "What was given", `Given at (${content.timeZone})`, "Level, mg/L", "Share, percent"],
    rows: [...gathered, ...shown].map((part) => [
      nameOf(part, content),
      part.source === "start" ? "concentration at the start" : sayGiven(part.source.give),
      part.source === "start" ? start : part.source.at,
      part.mgPerL,
      part.percent,
    ]),
  });
  return (
    <>
      <p>
        {content.regimenLabel}: <strong>{formatLevel(levelAt(prediction.given, atH))}</strong> at {when}.
      </p>
      {shown.length === 0 ? (
        <p class="soft">Nothing has been given yet, so nothing remains.</p>
      ) : (
        <>
          {sumMgPerL > 0 && (
            <RemainsPicture
              slices={slices}
              label={`The level at ${when}, cut into its parts; the table below names them`}
            />
          )}
          <div class="scroll-x" role="region" aria-label="Parts of the level" tabIndex={0}>
            <table class="remains-table">
              <caption>
                Each part is the level that its dose would leave alone. Numbers are rounded; the sum is made before
                rounding.
              </caption>
              <thead>
                <tr>
                  <th scope="col">Part</th>
                  <th scope="col">Given</th>
                  <th scope="col">When</th>
                  <th scope="col">Still there</th>
                  <th scope="col">Share</th>
                </tr>
              </thead>
              <tbody>
                {gathered.length > 0 && (
                  <tr>
                    <th scope="row">
                      <button
                        type="button"
                        class="button"
                        aria-expanded={unfolded.value}
                        onClick={() => (unfolded.value = !unfolded.value)}
                      >
                        <span aria-hidden="true">{unfolded.value ? "▾" : "▸"}&nbsp;</span>
                        {gatheredWords}
                      </button>
                    </th>
                    <td />
                    <td />
                    <td class="number">{formatLevel(gatheredMgPerL)}</td>
                    <td class="number">{formatPercent(gatheredPercent)}</td>
                  </tr>
                )}
                {unfolded.value &&
                  gathered.map((part) => <PartRow key={keyOfPart(part)} part={part} content={content} depth="inner" />)}
                {shown.map((part) => (
                  <PartRow key={keyOfPart(part)} part={part} content={content} depth="outer" />
                ))}
              </tbody>
              <tfoot>
                <tr>
                  <th scope="row" colSpan={3}>
                    Sum of the parts: the level on the curve
                  </th>
                  <td class="number">{formatLevel(sumMgPerL)}</td>
                  <td class="number">{formatPercent(sumMgPerL > 0 ? 100 : 0)}</td>
                </tr>
              </tfoot>
            </table>
          </div>
          <CsvButton fileName={`${content.caseLabel} ${content.regimenLabel} what remains`} table={file}>
            Parts as CSV
          </CsvButton>
        </>
      )}
    </>
  );
}

function PartRow({ part, content, depth }: { part: Part; content: RegimenContent; depth: "inner" | "outer" }) {
  const { source, mgPerL, percent } = part;
  return (
    <tr class={depth === "inner" ? "remains-inner" : undefined}>
      <th scope="row">{nameOf(part, content)}</th>
      <td>{source === "start" ? "level already there" : sayGiven(source.give)}</td>
      <td>{sayClock(source === "start" ? content.setting.plan.start : source.at, content.timeZone)}</td>
      <td class="number">{formatLevel(mgPerL)}</td>
      <td class="number">{formatPercent(percent)}</td>
    </tr>
  );
}

function keyOfPart({ source }: Part): string {
  return source === "start" ? "start" : source.key;
}

function nameOf({ source }: Part, content: RegimenContent): string {
  return source === "start" ? "Start of the plan" : capital(nameOfDose(source, content.schedule));
}

function shortNameOf({ source }: Part): string {
  if (source === "start") return "start";
  return source.occurrence === undefined ? "extra" : String(source.occurrence + 1);
}
