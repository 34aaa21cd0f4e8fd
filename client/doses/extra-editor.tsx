import { useSignal } from "@preact/signals";
import { counts } from "../../shared/contract/limits.ts";
import type { ExtraDose } from "../../shared/contract/schedule.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { MomentField } from "../controls/moment-field.tsx";
import { TextField } from "../controls/text-field.tsx";
import { GiveFields } from "../orders/give-fields.tsx";
import { focusOn } from "../shell/focus.ts";
import { ProblemSummary } from "../shell/problem-summary.tsx";
import { readExtraDraft } from "./extra-draft.ts";

interface ExtraEditorProps {
  readonly id: string;
  readonly title: string;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly onDraft: (fields: Draft) => void;
  readonly onApply: (extra: ExtraDose) => void;
  readonly onCancel: () => void;
}

/** A dose that was given and that nobody planned. */
export function ExtraEditor({ id, title, draft, timeZone, onDraft, onApply, onCancel }: ExtraEditorProps) {
  const checked = useSignal(false);
  const read = readExtraDraft(draft, id, timeZone);
  const problems = checked.value && !read.ok ? read.problems : {};
  const name = (field: string) => `extra-${id}-${field}`;
  const apply = (event: Event) => {
    event.preventDefault();
    checked.value = true;
    if (read.ok) onApply(read.extra);
    else focusOn(name("problems"));
  };
  return (
    <form class="editor" noValidate onSubmit={apply} aria-label={title}>
      <h3>{title}</h3>
      <ProblemSummary id={name("problems")} problems={problems} fieldId={name} />
      <div class="fields">
        <MomentField
          id={name("at")}
          label="Given at"
          moment={momentIn(draft, "at")}
          timeZone={timeZone}
          onMoment={(moment) => onDraft(momentFields("at", moment))}
          problem={problems["at"]}
          emptiness="allowed"
        />
      </div>
      <GiveFields name={name} draft={draft} problems={problems} onDraft={onDraft} />
      <TextField
        id={name("note")}
        label="Note"
        text={textIn(draft, "note")}
        onText={(note) => onDraft({ note })}
        longest={counts.noteCharacters}
      />
      <div class="button-row">
        <button type="submit" class="button button-main">
          Apply
        </button>
        <button type="button" class="button" onClick={onCancel}>
          Cancel
        </button>
      </div>
    </form>
  );
}
