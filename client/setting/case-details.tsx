import { useComputed } from "@preact/signals";
import { counts } from "../../shared/contract/limits.ts";
import type { CaseDocument } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { textIn } from "../case/drafts.ts";
import { PageContents } from "../case/page-contents.tsx";
import { TimeZoneField, timeZoneProblem } from "../cases/time-zone-field.tsx";
import { momentText, readMoment } from "../controls/moment.ts";
import { TextField } from "../controls/text-field.tsx";
import { refusedAt } from "../saving/refused.ts";
import { SaveDetails } from "../saving/save-details-button.tsx";

/** A time zone that is being typed, or that is none, is kept like every open editor. */
const zoneDraft = "time-zone";

const keepsMoments =
  "Another zone moves nothing: what is dated 08:00 now shows another clock time then; only orders at clock times keep theirs";

/** The case's label, time zone and notes. */
export function CaseDetails({ page }: { page: CasePage }) {
  const { model, drafts } = page;
  const label = useComputed(() => model.document.value.label).value;
  const notes = useComputed(() => model.document.value.notes).value;
  const timeZone = page.timeZone.value;
  const started = useComputed(() => model.document.value.form.start.text.trim() !== "").value;
  const typedZone = drafts.all.value[zoneDraft];
  const zoneText = typedZone === undefined ? timeZone : textIn(typedZone, "text");
  return (
    <section class="case-title" aria-label="Case">
      <h1>{label || "Case without a label"}</h1>
      {page.stored.value.case.archived && (
        <p class="missing">This case is archived. It can be brought back from the list of cases.</p>
      )}
      <PageContents />
      <div class="fields">
        <TextField
          id="case-label"
          label="Label"
          text={label}
          onText={(text) => model.change("label of the case", (document) => ({ ...document, label: text }), "label")}
          hint="enter no names and nothing else that identifies a person"
          problem={
            label.trim() === "" ? "Label is empty; give the case a label without names" : refusedAt(page, "case-label")
          }
          longest={counts.labelCharacters}
        />
        <TimeZoneField
          id="case-zone"
          text={zoneText}
          warning={started ? keepsMoments : undefined}
          problem={typedZone === undefined ? refusedAt(page, "case-zone") : timeZoneProblem(zoneText)}
          onText={(text, stage) => {
            drafts.set(zoneDraft, { text });
            if (stage !== "settled" || timeZoneProblem(text) !== undefined) return;
            drafts.close(zoneDraft);
            model.change("time zone", (document) => inZone(document, text.trim()));
          }}
        />
        <div class="whole">
          <TextField
            id="case-notes"
            label="Notes"
            text={notes}
            onText={(text) => model.change("notes of the case", (document) => ({ ...document, notes: text }), "notes")}
            lines={2}
            longest={counts.noteCharacters}
            problem={refusedAt(page, "case-notes")}
          />
        </div>
      </div>
      <SaveDetails page={page} />
    </section>
  );
}

/** Another zone shows the same instants by another clock; nothing that is dated moves. */
function inZone(document: CaseDocument, timeZone: string): CaseDocument {
  if (timeZone === document.timeZone) return document;
  const start = readMoment(document.form.start, document.timeZone, "");
  const form = start.ok ? { ...document.form, start: momentText(start.instant, timeZone) } : document.form;
  return { ...document, timeZone, form };
}
