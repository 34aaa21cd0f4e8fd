import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { limits } from "../../shared/contract/limits.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { type MomentText, momentText, readMoment } from "../controls/moment.ts";
import { MomentField } from "../controls/moment-field.tsx";
import { readLimited } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { focusOn } from "../shell/focus.ts";
import type { CurveView } from "./curve-view.ts";
import type { DoseChange } from "./dose-edits.ts";
import { nameOfDose, sayStatus } from "./dose-words.ts";
import { markId } from "./mark-layout.ts";
import { predictionOf } from "./predictions.ts";
import { selectedKeyOf } from "./selected.ts";
import { usePaced } from "./use-paced.ts";

/** The editor of the dose that was opened on the ruler; nothing while none is. */
export function DoseEditor({ view }: { view: CurveView }) {
  const contents = usePaced(view).value;
  const alternativeKey = selectedKeyOf(view.model);
  const content = alternativeKey === undefined ? undefined : contents.get(alternativeKey);
  const prediction = content && predictionOf(content);
  const dose = prediction?.ok ? prediction.doses.find(({ key }) => key === view.editing.value) : undefined;
  if (dose === undefined || content === undefined || alternativeKey === undefined) return null;
  return <Editor key={dose.key} view={view} alternativeKey={alternativeKey} content={content} dose={dose} />;
}

interface EditorProps {
  readonly view: CurveView;
  readonly alternativeKey: string;
  readonly content: RegimenContent;
  readonly dose: ScheduledDose;
}

function Editor({ view, alternativeKey, content, dose }: EditorProps) {
  const { timeZone } = content;
  const moment = useSignal<MomentText>(momentText(dose.at, timeZone));
  const amount = useSignal("amountMg" in dose.give ? String(dose.give.amountMg) : "");
  const duration = useSignal("durationH" in dose.give ? String(dose.give.durationH) : "");
  useEffect(() => focusOn("mark-time"), []);
  const close = () => {
    view.editing.value = undefined;
    focusOn(markId(dose.key));
  };
  const at = readMoment(moment.value, timeZone, "Time of the dose");
  const amountRead = "amountMg" in dose.give ? readLimited("amountMg", amount.value) : undefined;
  const durationRead = "durationH" in dose.give ? readLimited("durationH", duration.value) : undefined;
  const apply = (event: Event) => {
    event.preventDefault();
    if (!at.ok || amountRead?.ok === false || durationRead?.ok === false) return;
    view.hand.edit(alternativeKey, dose, changeOf(dose, at.instant, amountRead?.value, durationRead?.value));
    close();
  };
  const name = nameOfDose(dose, content.schedule);
  return (
    <form
      class="editor"
      aria-labelledby="mark-editor-title"
      noValidate
      onSubmit={apply}
      onKeyDown={(event) => {
        if (event.key === "Escape") close();
      }}
    >
      <h3 id="mark-editor-title">
        Change {name} <span class="soft">({sayStatus(dose, timeZone)})</span>
      </h3>
      {dose.status === "omitted" ? (
        <p>It is recorded as omitted. To give it after all, change its record under the doses given.</p>
      ) : (
        <div class="fields">
          <MomentField
            id="mark-time"
            label="Time of the dose"
            moment={moment.value}
            timeZone={timeZone}
            onMoment={(next) => (moment.value = next)}
          />
          {amountRead && (
            <TextField
              id="mark-amount"
              label={limits.amountMg.label}
              unit="mg"
              mode="decimal"
              text={amount.value}
              onText={(text) => (amount.value = text)}
              problem={amountRead.ok ? undefined : amountRead.problem}
            />
          )}
          {durationRead && (
            <TextField
              id="mark-duration"
              label={limits.durationH.label}
              unit="h"
              mode="decimal"
              text={duration.value}
              onText={(text) => (duration.value = text)}
              problem={durationRead.ok ? undefined : durationRead.problem}
            />
          )}
        </div>
      )}
      <div class="button-row">
        {dose.status !== "omitted" && (
          <>
            <button type="submit" class="button button-main">
              Change the dose
            </button>
            <button
              type="button"
              class="button"
              onClick={() => {
                view.editing.value = undefined;
                view.hand.remove(alternativeKey, dose);
                focusOn("curve-title");
              }}
            >
              {dose.status === "as-planned" || dose.status === "changed" ? "Record as omitted" : "Delete the dose"}
            </button>
          </>
        )}
        <button type="button" class="button" id={dose.status === "omitted" ? "mark-time" : undefined} onClick={close}>
          {dose.status === "omitted" ? "Close" : "Leave as it is"}
        </button>
      </div>
    </form>
  );
}

/** Only what was really changed, so that moving a dose writes no amount. */
function changeOf(
  { at, give }: ScheduledDose,
  toAt: string,
  amountMg: number | undefined,
  durationH: number | undefined,
): DoseChange {
  return {
    ...(toAt !== at && { at: toAt }),
    ...(amountMg !== undefined && "amountMg" in give && amountMg !== give.amountMg && { amountMg }),
    ...(durationH !== undefined && "durationH" in give && durationH !== give.durationH && { durationH }),
  };
}
