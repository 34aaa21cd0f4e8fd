import { useComputed, useSignal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { WaitQuestion } from "../../shared/kinetics/wait-until.ts";
import { hoursBetween, instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { formatLevel } from "../../shared/units/format.ts";
import type { CaseModel } from "../case/case-model.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { type MomentText, momentText, readMoment } from "../controls/moment.ts";
import { MomentField } from "../controls/moment-field.tsx";
import { readLimited } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { lookAt } from "./alternative-look.ts";
import { useSettled } from "./use-settled.ts";
import { sayAnswer } from "./wait-words.ts";
import "./wait-section.css";

type Direction = WaitQuestion["direction"];

/** When the level will have fallen below, or risen above, a value. */
export function WaitSection({ model }: { model: CaseModel }) {
  const contents = useSettled(model.contents).value;
  const plan = useComputed(() => model.document.value.setting?.plan).value;
  const { timeZone } = model.document.value;
  const value = useSignal("");
  const direction = useSignal<Direction>("below");
  const from = useSignal<"cursor" | "typed">("cursor");
  const typed = useSignal<MomentText>({ text: "" });
  const title = <h2 id="wait-title">How long to wait</h2>;
  if (plan === undefined || contents.size === 0)
    return (
      <section class="part" aria-labelledby="wait-title">
        {title}
        <p class="soft">Waiting times appear here once there is an alternative to predict.</p>
      </section>
    );
  const level = readLimited("concentrationMgPerL", value.value, "Level to wait for");
  const read = readMoment(typed.value, timeZone, "Waiting from");
  const typedH = read.ok ? hoursBetween(plan.start, read.instant) : undefined;
  const fromH = from.value === "cursor" ? Math.max(0, model.cursorH.value) : typedH;
  const outside = fromH !== undefined && !(fromH >= 0 && fromH < plan.horizonH);
  const outsideWords = "Waiting must start within the plan, before its end";
  return (
    <section class="part" aria-labelledby="wait-title">
      {title}
      <div class="wait-question">
        <ChoiceField
          id="wait-direction"
          legend="Until the level is"
          value={direction.value}
          choices={[
            { value: "below", label: "below" },
            { value: "above", label: "above" },
          ]}
          onChoice={(next) => {
            direction.value = next;
          }}
        />
        <TextField
          id="wait-level"
          label="Level to wait for"
          unit="mg/L"
          mode="decimal"
          text={value.value}
          onText={(text) => {
            value.value = text;
          }}
          problem={value.value.trim() === "" || level.ok ? undefined : level.problem}
        />
        <ChoiceField
          id="wait-from"
          legend="Waiting from"
          value={from.value}
          choices={[
            {
              value: "cursor",
              label: `the cursor, ${sayClock(instantAt(plan.start, Math.max(0, model.cursorH.value), timeZone), timeZone)}`,
            },
            { value: "typed", label: "another time" },
          ]}
          onChoice={(next) => {
            if (next === "typed" && typed.value.text === "")
              typed.value = momentText(instantAt(plan.start, Math.max(0, model.cursorH.value), timeZone), timeZone);
            from.value = next;
          }}
        />
        {from.value === "typed" && (
          <MomentField
            id="wait-from-time"
            label="Waiting from"
            moment={typed.value}
            timeZone={timeZone}
            onMoment={(next) => {
              typed.value = next;
            }}
            problem={outside ? outsideWords : undefined}
          />
        )}
      </div>
      {from.value === "cursor" && outside && <p class="soft">{outsideWords}: move the cursor back a little.</p>}
      {level.ok && fromH !== undefined && !outside ? (
        <Answers
          contents={[...contents.values()]}
          question={{ fromH, mgPerL: level.value, direction: direction.value }}
        />
      ) : (
        <p class="soft">The answers appear here once a level and a time are stated.</p>
      )}
    </section>
  );
}

type Question = Omit<WaitQuestion, "meanwhile">;

function Answers({ contents, question }: { contents: readonly RegimenContent[]; question: Question }) {
  const words = `${question.direction} ${formatLevel(question.mgPerL)}`;
  return (
    <div class="scroll-x" role="region" aria-label="Waiting times" tabIndex={0}>
      <table>
        <caption>When the level is {words}, exactly</caption>
        <thead>
          <tr>
            <th scope="col">Alternative</th>
            <th scope="col">If nothing more is given: what runs is stopped</th>
            <th scope="col">If no dose begins: what runs is finished</th>
            <th scope="col">If the plan goes on</th>
          </tr>
        </thead>
        <tbody>
          {contents.map((content, place) => (
            <tr key={place}>
              <th scope="row">
                {lookAt(place).letter} {content.regimenLabel}
              </th>
              <td>{sayAnswer(content, { ...question, meanwhile: "nothing-more" })}</td>
              <td>{sayAnswer(content, { ...question, meanwhile: "nothing-begins" })}</td>
              <td>{sayAnswer(content, { ...question, meanwhile: "plan-goes-on" })}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
