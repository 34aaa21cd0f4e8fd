import { useComputed, useSignal } from "@preact/signals";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { type Alternative, letterOf, withSchedule } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { newId } from "../case/new-id.ts";
import { CsvButton } from "../reading/csv-button.tsx";
import { nameOfDose } from "../reading/dose-words.ts";
import { focusOn } from "../shell/focus.ts";
import { datedDoses } from "./dated-doses.ts";
import { draftOfDose, type OrderedDose } from "./dose-draft.ts";
import { DoseEditor } from "./dose-editor.tsx";
import { DoseRow, doseButtonId } from "./dose-row.tsx";
import { doseTable } from "./dose-table.ts";
import { draftOfExtra } from "./extra-draft.ts";
import { ExtraEditor } from "./extra-editor.tsx";
import { LostRecords } from "./lost-records.tsx";
import { withDoseEdit, withExtra, withoutExtra } from "./record-edits.ts";
import "./doses-part.css";

/** A long plan has thousands of doses; so many are shown until more are asked for. */
const shownAtOnce = 40;

/** Every dose with its date: what is planned, what was given, and the way to say otherwise. */
export function DosesPart({ page }: { page: CasePage }) {
  const { model, drafts } = page;
  const shown = useSignal(shownAtOnce);
  const dated = useComputed(() => datedDoses(page.selectedContent.value));
  const document = page.settled.value;
  const selected = page.selected.value;
  if (selected === undefined) return null;
  const { timeZone } = document;
  const letter = letterOf(document, selected.key);
  const { doses, lost } = dated.value;
  const draftName = (key: string) => `dose:${selected.key}:${key}`;
  const close = (key: string, backTo: string) => {
    drafts.close(draftName(key));
    focusOn(backTo, "doses-title");
  };
  const editor = (dose: ScheduledDose) => {
    const draft = drafts.all.value[draftName(dose.key)];
    if (draft === undefined) return null;
    if (dose.extraId !== undefined) return extraEditor(dose.key, dose.extraId, "Extra dose");
    if (!isOrdered(dose)) return null;
    return (
      <DoseEditor
        dose={dose}
        title={titleOf(nameOfDose(dose, selected.schedule))}
        draft={draft}
        timeZone={timeZone}
        onDraft={(fields) => drafts.set(draftName(dose.key), fields)}
        onApply={(edit) => {
          model.change(`${nameOfDose(dose, selected.schedule)} of alternative ${letter}`, (now) =>
            withSchedule(now, selected.key, (schedule) => withDoseEdit(schedule, dose, edit)),
          );
          close(dose.key, doseButtonId(dose.key));
        }}
        onCancel={() => close(dose.key, doseButtonId(dose.key))}
      />
    );
  };
  const extraEditor = (key: string, id: string, title: string) => {
    const draft = drafts.all.value[draftName(key)];
    if (draft === undefined) return null;
    const backTo = id === "new" ? "extra-add" : doseButtonId(key);
    return (
      <>
        <ExtraEditor
          id={id}
          title={title}
          draft={draft}
          timeZone={timeZone}
          onDraft={(fields) => drafts.set(draftName(key), fields)}
          onApply={(extra) => {
            const applied = id === "new" ? { ...extra, id: newId() } : extra;
            model.change(`extra dose of alternative ${letter}`, (now) =>
              withSchedule(now, selected.key, (schedule) => withExtra(schedule, applied)),
            );
            close(key, backTo);
          }}
          onCancel={() => close(key, backTo)}
        />
        {id !== "new" && (
          <button
            type="button"
            class="button"
            onClick={() => {
              model.change(`extra dose of alternative ${letter} deleted`, (now) =>
                withSchedule(now, selected.key, (schedule) => withoutExtra(schedule, id)),
              );
              close(key, "extra-add");
            }}
          >
            Delete this extra dose
          </button>
        )}
      </>
    );
  };
  return (
    <section class="part" aria-labelledby="doses-title">
      <h2 id="doses-title" tabIndex={-1}>
        Doses of alternative {letter}
      </h2>
      <p class="soft">A dose without a record counts as given as planned.</p>
      <LostRecords page={page} alternative={selected} lost={lost} />
      {doses.length > 0 && (
        <div class="scroll-x" role="region" aria-label={`Table of the doses of alternative ${letter}`} tabIndex={0}>
          <table class="doses">
            <thead>
              <tr>
                <th scope="col">Planned time</th>
                <th scope="col">Into the plan</th>
                <th scope="col">Dose</th>
                <th scope="col">Planned</th>
                <th scope="col">What was given</th>
                <th scope="col">Change</th>
              </tr>
            </thead>
            <tbody>
              {doses.slice(0, shown.value).map((dose) => (
                <DoseRow
                  key={dose.key}
                  dose={dose}
                  schedule={selected.schedule}
                  note={noteOf(selected, dose)}
                  timeZone={timeZone}
                  onEdit={() => {
                    if (drafts.all.value[draftName(dose.key)] === undefined)
                      drafts.open(draftName(dose.key), openingDraft(selected, dose, timeZone));
                    focusOn(firstFieldOf(dose));
                  }}
                >
                  {editor(dose)}
                </DoseRow>
              ))}
            </tbody>
          </table>
        </div>
      )}
      <div class="button-row doses-more">
        {doses.length > shown.value && (
          <button
            type="button"
            class="button"
            onClick={() => {
              const next = doses[shown.value];
              shown.value += shownAtOnce;
              if (next !== undefined) focusOn(doseButtonId(next.key));
            }}
          >
            Show {Math.min(shownAtOnce, doses.length - shown.value)} more of {doses.length} doses
          </button>
        )}
        {doses.length > 0 && (
          <CsvButton
            fileName={`${document.label} ${selected.label} doses`}
            table={() => doseTable(doses, selected.schedule, timeZone)}
          >
            Doses as CSV
          </CsvButton>
        )}
        {drafts.all.value[draftName("new")] === undefined && (
          <button
            type="button"
            class="button"
            id="extra-add"
            onClick={() => {
              drafts.open(draftName("new"), { kind: "bolus" });
              focusOn("extra-new-at");
            }}
          >
            Record an extra dose
          </button>
        )}
      </div>
      {extraEditor("new", "new", "Extra dose")}
    </section>
  );
}

function titleOf(name: string): string {
  return name.charAt(0).toUpperCase() + name.slice(1);
}

function isOrdered(dose: ScheduledDose): dose is OrderedDose {
  return dose.orderId !== undefined && dose.occurrence !== undefined;
}

function firstFieldOf({ orderId, occurrence, extraId }: ScheduledDose): string {
  return extraId === undefined ? `dose-${orderId}-${occurrence}-given-none` : `extra-${extraId}-at`;
}

function openingDraft({ schedule }: Alternative, dose: ScheduledDose, timeZone: string) {
  const extra = schedule.extras.find(({ id }) => id === dose.extraId);
  if (extra !== undefined) return draftOfExtra(extra, timeZone);
  const order = schedule.orders.find(({ id }) => id === dose.orderId);
  const exception = order?.exceptions.find(({ occurrence }) => occurrence === dose.occurrence);
  return draftOfDose(exception, recordOf(schedule, dose), timeZone);
}

function noteOf({ schedule }: Alternative, dose: ScheduledDose): string {
  const extra = schedule.extras.find(({ id }) => id === dose.extraId);
  return extra?.note ?? recordOf(schedule, dose)?.note ?? "";
}

function recordOf({ records }: Alternative["schedule"], { orderId, occurrence }: ScheduledDose) {
  return records.find((record) => record.orderId === orderId && record.occurrence === occurrence);
}
