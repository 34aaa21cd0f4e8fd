import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { counts } from "../../shared/contract/limits.ts";
import { TextField } from "../controls/text-field.tsx";
import type { Failure } from "../http/answer.ts";
import { dropKept, keptName, readKept, writeKept } from "../keeping/kept-text.ts";
import { goTo } from "../routes.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { TimeZoneField, timeZoneProblem } from "./time-zone-field.tsx";

const kept = keptName("new-case");
const fields = ["label", "timeZone", "notes"] as const;
type Typed = Readonly<Record<(typeof fields)[number], string>>;

/** Makes a case and goes to its page. What is typed is kept in the browser until the case is made. */
export function NewCaseForm() {
  const typed = useSignal<Typed>(readTyped());
  const checked = useSignal(false);
  const failure = useSignal<Failure | undefined>(undefined);
  const busy = useSignal(false);
  const set = (part: Partial<Typed>) => {
    typed.value = { ...typed.peek(), ...part };
  };
  useEffect(() => typed.subscribe((now) => void writeKept(kept, JSON.stringify(now))), [typed]);
  const { label, timeZone, notes } = typed.value;
  const labelProblem = label.trim() === "" ? "Label is empty; give the case a label without names" : undefined;
  const zoneProblem = timeZoneProblem(timeZone);
  const make = async (event: Event) => {
    event.preventDefault();
    checked.value = true;
    if (labelProblem || zoneProblem) return focusOn(labelProblem ? "new-label" : "new-zone");
    if (busy.value) return;
    busy.value = true;
    const { makeCase } = await import("../http/cases-api.ts");
    const answer = await makeCase({ label: label.trim(), timeZone: timeZone.trim(), notes });
    busy.value = false;
    failure.value = answer.ok ? undefined : answer.failure;
    if (!answer.ok) return;
    dropKept(kept);
    goTo(`/cases/${answer.value.id}`);
  };
  return (
    <section class="part" aria-labelledby="new-case-title">
      <h2 id="new-case-title">Make a case</h2>
      <form noValidate onSubmit={make} class="fields">
        <TextField
          id="new-label"
          label="Label"
          text={label}
          onText={(text) => set({ label: text })}
          hint="enter no names and nothing else that identifies a person"
          problem={checked.value ? labelProblem : undefined}
          longest={counts.labelCharacters}
          required
        />
        <TimeZoneField
          id="new-zone"
          text={timeZone}
          onText={(text) => set({ timeZone: text })}
          problem={checked.value ? zoneProblem : undefined}
        />
        <div class="whole">
          <TextField
            id="new-notes"
            label="Notes"
            text={notes}
            onText={(text) => set({ notes: text })}
            lines={3}
            longest={counts.noteCharacters}
            hint="free text; enter no names here either"
          />
        </div>
        <div class="whole button-row">
          <button type="submit" class="button button-main" disabled={busy.value}>
            Make the case
          </button>
        </div>
      </form>
      {failure.value && <FailureNote failure={failure.value} fieldOf={fieldOf} />}
    </section>
  );
}

function fieldOf(pointer: string) {
  if (pointer === "#/label") return { id: "new-label", label: "Label" };
  if (pointer === "#/timeZone") return { id: "new-zone", label: "Time zone" };
  return pointer === "#/notes" ? { id: "new-notes", label: "Notes" } : undefined;
}

function readTyped(): Typed {
  const fresh = { label: "", timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone, notes: "" };
  try {
    const read: unknown = JSON.parse(readKept(kept) ?? "{}");
    if (typeof read !== "object" || read === null) return fresh;
    const texts = Object.entries(read).filter(
      ([name, text]) => fields.includes(name as never) && typeof text === "string",
    );
    return { ...fresh, ...Object.fromEntries(texts) };
  } catch {
    return fresh;
  }
}
