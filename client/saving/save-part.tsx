import { useSignal } from "@preact/signals";
import { unanswered } from "../../shared/cautions/gather.ts";
import { counts } from "../../shared/contract/limits.ts";
import { letterOf } from "../case/case-document.ts";
import { type CasePage, savedStateOf } from "../case/case-page.ts";
import { textIn } from "../case/drafts.ts";
import { TextField } from "../controls/text-field.tsx";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { ProblemSummary } from "../shell/problem-summary.tsx";
import { isAbout } from "./is-about.ts";
import { fieldOfPointer, refusedAt } from "./refused.ts";
import { RevisionsPart } from "./revisions-part.tsx";
import { type SaveOutcome, saveAlternative } from "./save-alternative.ts";
import { SavedNote } from "./saved-note.tsx";
import { StaleNote } from "./stale-note.tsx";
import { reasonField, StopReasons, stopsOf } from "./stop-reasons.tsx";
import "./save-part.css";

/** Saves the alternative being edited as a revision that never changes, and shows the earlier ones. */
export function SavePart({ page }: { page: CasePage }) {
  const { drafts } = page;
  const outcome = useSignal<{ readonly key: string; readonly result: SaveOutcome } | undefined>(undefined);
  const checked = useSignal(false);
  const busy = useSignal(false);
  const selected = page.selected.value;
  if (selected === undefined) return null;
  const letter = letterOf(page.settled.value, selected.key);
  const draftName = `save:${selected.key}`;
  const draft = drafts.all.value[draftName];
  const problems = problemsOf(page, textIn(draft, "reason"), textIn(draft, "preparedBy"));
  const shown = checked.value ? problems : {};
  const state = savedStateOf(page, selected);
  const save = async () => {
    checked.value = true;
    if (Object.keys(problems).length > 0) return focusOn("save-problems");
    if (busy.value) return;
    busy.value = true;
    const { key } = selected;
    const words = { reason: textIn(draft, "reason").trim(), preparedBy: textIn(draft, "preparedBy").trim() };
    const result = await saveAlternative(page, key, words);
    busy.value = false;
    outcome.value = { key, result };
    if (result.kind !== "saved") return;
    checked.value = false;
    drafts.close(`save:${key}`);
    announce(`Saved as revision ${result.revision.number}`);
    focusOn("saved-note");
  };
  const result = outcome.value?.key === selected.key ? outcome.value.result : undefined;
  return (
    <section class="part" aria-labelledby="save-title">
      <h2 id="save-title">Save alternative {letter}</h2>
      <p class="soft">
        {state === "never" && "Not saved yet. "}
        {state === "saved" && `Nothing has changed since revision ${selected.savedNumber}. `}
        {state === "changed" && `Changed since revision ${selected.savedNumber}. `}A revision never changes; saving
        again makes the next one. Kinetics and plan are saved with it.
      </p>
      <StopReasons page={page} problems={shown} />
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void save();
        }}
      >
        <ProblemSummary id="save-problems" problems={shown} fieldId={(field) => fieldIds[field] ?? field} />
        <div class="fields">
          <TextField
            id="save-reason"
            label="Reason for this revision"
            text={textIn(draft, "reason")}
            onText={(reason) => drafts.set(draftName, { reason })}
            problem={shown["reason"] ?? refusedAt(page, "save-reason")}
            longest={counts.noteCharacters}
            required
          />
          <TextField
            id="save-preparedBy"
            label="Prepared by"
            text={textIn(draft, "preparedBy")}
            onText={(preparedBy) => drafts.set(draftName, { preparedBy })}
            problem={shown["preparedBy"] ?? refusedAt(page, "save-preparedBy")}
            longest={counts.labelCharacters}
            required
          />
        </div>
        <div class="button-row save-row">
          <button type="submit" class="button button-main" disabled={busy.value}>
            {busy.value ? "Saving …" : `Save as revision ${selected.savedNumber + 1} of ${letter}`}
          </button>
        </div>
      </form>
      {result?.kind === "saved" && <SavedNote revision={result.revision} />}
      {result?.kind === "failed" && <FailureNote failure={result.failure} fieldOf={fieldOfPointer} onRetry={save} />}
      {result?.kind === "stale" && (
        <StaleNote
          page={page}
          stale={result}
          onSettled={(choice) => {
            outcome.value = undefined;
            if (choice === "save-on-top") void save();
          }}
        />
      )}
      <RevisionsPart page={page} />
    </section>
  );
}

const fieldIds: Readonly<Record<string, string>> = {
  reason: "save-reason",
  preparedBy: "save-preparedBy",
  label: "case-label",
  regimenLabel: "alternative-label",
  setting: "setting-title",
  schedule: "orders-title",
};

function problemsOf(page: CasePage, reason: string, preparedBy: string): Record<string, string> {
  const problems: Record<string, string> = {};
  const { label } = page.settled.value;
  const selected = page.selected.value;
  const { problem, cautions } = page.judged.value;
  if (label.trim() === "") problems["label"] = "Label of the case is empty";
  if (selected?.label.trim() === "") problems["regimenLabel"] = "Name of the alternative is empty";
  if (page.selectedContent.value === undefined)
    problems["setting"] = "Kinetics and plan are not complete: see “Who and what drug”";
  if (problem !== undefined)
    problems["schedule"] = "The alternative cannot be computed: see what stands with its orders";
  const reasons = (selected?.cautionReasons ?? []).filter((each) => each.reason.trim().length >= 3);
  const open = unanswered(cautions, reasons);
  stopsOf(cautions).forEach((stop, index) => {
    if (open.some((each) => isAbout(each, stop)))
      problems[reasonField(index)] = `Reason for going on is needed, in at least 3 characters: ${stop.text}`;
  });
  if (reason.trim().length < 3) problems["reason"] = "Reason for this revision must say why, in at least 3 characters";
  if (preparedBy.trim() === "") problems["preparedBy"] = "Prepared by is empty; name who prepared it";
  return problems;
}
