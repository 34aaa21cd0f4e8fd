import { useSignal } from "@preact/signals";
import type { CasePage } from "../case/case-page.ts";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { fieldOfPointer } from "./refused.ts";
import { type Outcome, saveDetails } from "./save-details.ts";
import { StaleNote } from "./stale-note.tsx";

/** Saves what all alternatives share without making a revision. */
export function SaveDetails({ page }: { page: CasePage }) {
  const outcome = useSignal<Outcome>({ kind: "done" });
  const busy = useSignal(false);
  const save = async () => {
    if (busy.value) return;
    busy.value = true;
    page.refused.value = [];
    outcome.value = await saveDetails(page);
    busy.value = false;
    if (outcome.value.kind === "done") announce("The case's details are saved");
  };
  const { label, setting } = page.settled.value;
  const changed = page.detailsChanged.value;
  const unfinished = changed && setting === undefined && page.stored.value.case.setting !== undefined;
  const now = outcome.value;
  return (
    <div>
      <div class="button-row">
        <button type="button" class="button" disabled={!changed || label.trim() === "" || busy.value} onClick={save}>
          Save the case's details
        </button>
        <a class="button" href={`/api/cases/${page.stored.value.case.id}/file`} download>
          Download the case as JSON, as saved
        </a>
        <span class="soft">
          {changed
            ? unfinished
              ? "Label, notes and time zone can be saved; kinetics and plan have a field to mend first."
              : "Label, notes, time zone, kinetics and plan are not saved yet. Saving a revision saves them too."
            : "Label, notes, time zone, kinetics and plan are as saved."}
        </span>
      </div>
      {now.kind === "failed" && <FailureNote failure={now.failure} fieldOf={fieldOfPointer} />}
      {now.kind === "stale" && (
        <StaleNote
          page={page}
          stale={now}
          onSettled={(choice) => {
            outcome.value = { kind: "done" };
            if (choice === "save-on-top") void save();
          }}
        />
      )}
    </div>
  );
}
