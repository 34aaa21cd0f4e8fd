import { useComputed, useSignal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { figuresOfPrepared } from "../../shared/figures/figures.ts";
import { judge } from "../../shared/figures/judge.ts";
import type { Which } from "../../shared/figures/prepared.ts";
import { hoursBetween } from "../../shared/schedule/clock.ts";
import { formatHours } from "../../shared/units/format.ts";
import type { CaseModel } from "../case/case-model.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { type MomentText, momentText, readMoment } from "../controls/moment.ts";
import { MomentField } from "../controls/moment-field.tsx";
import { lookAt } from "./alternative-look.ts";
import { CsvButton } from "./csv-button.tsx";
import { type FigureColumn, FigureTable, figureFile } from "./figure-table.tsx";
import { predictionOf } from "./predictions.ts";
import { useSettled } from "./use-settled.ts";
import "./figures-section.css";

/** The alternatives side by side in figures. */
export function FiguresSection({ model }: { model: CaseModel }) {
  const contents = useSettled(model.contents).value;
  const plan = useComputed(() => model.document.value.setting?.plan).value;
  const { timeZone, label } = model.document.value;
  const typed = useSignal<MomentText | undefined>(undefined);
  const which = useSignal<Which>("given");
  const title = <h2 id="figures-title">The alternatives in figures</h2>;
  if (plan === undefined || contents.size === 0)
    return (
      <section class="part" aria-labelledby="figures-title">
        {title}
        <p class="soft">The figures appear here once there is an alternative to predict.</p>
      </section>
    );
  const moment = typed.value ?? momentText(plan.start, timeZone);
  const read = readMoment(moment, timeZone, "Start of the 24 hours");
  const areaFromH = read.ok ? hoursBetween(plan.start, read.instant) : 0;
  const outside = !(areaFromH >= 0 && areaFromH < plan.horizonH);
  const differs = [...contents.values()].some((content) => {
    const prediction = predictionOf(content);
    return prediction.ok && prediction.planned !== undefined;
  });
  const columns = columnsOf([...contents.values()], differs ? which.value : "given", outside ? 0 : areaFromH);
  return (
    <section class="part" aria-labelledby="figures-title">
      {title}
      <div class="figure-choices">
        <MomentField
          id="figures-area-from"
          label="Start of the 24 hours of the area"
          moment={moment}
          timeZone={timeZone}
          onMoment={(next) => {
            typed.value = next;
          }}
          problem={
            outside
              ? `The 24 hours must start within the plan, from 0 to below ${formatHours(plan.horizonH)} into it`
              : undefined
          }
        />
        {differs && (
          <ChoiceField
            id="figures-which"
            legend="Figures of"
            value={which.value}
            choices={[
              { value: "given", label: "what was given, then the plan" },
              { value: "planned", label: "the plan alone" },
            ]}
            onChoice={(value) => {
              which.value = value;
            }}
          />
        )}
      </div>
      <FigureTable caption="Figures of the alternatives" columns={columns} />
      <CsvButton fileName={`${label} figures`} table={() => figureFile(columns)}>
        Figures as CSV
      </CsvButton>
    </section>
  );
}

/** Marks compare the alternatives with each other, so they are made of all of them at once. */
function columnsOf(contents: readonly RegimenContent[], which: Which, areaFromH: number): FigureColumn[] {
  const answers = contents.map((content) => {
    const prediction = predictionOf(content);
    if (!prediction.ok) return prediction;
    const prepared = which === "planned" ? (prediction.planned ?? prediction.given) : prediction.given;
    return { ok: true as const, figures: figuresOfPrepared(prepared, { areaFromH }) };
  });
  const marks = judge(
    answers.flatMap((answer) => (answer.ok ? [answer.figures] : [])),
    contents[0]?.setting.rangeMgPerL,
  );
  let judged = 0;
  return contents.map((content, place) => {
    const answer = answers[place]!;
    return {
      key: String(place),
      title: `${lookAt(place).letter} ${content.regimenLabel}`,
      timeZone: content.timeZone,
      answer: answer.ok ? { ...answer, marks: marks[judged++]! } : answer,
    };
  });
}
