import { useSignal } from "@preact/signals";
import { counts } from "../../shared/contract/limits.ts";
import type { DatedEliminationChange } from "../../shared/contract/setting.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { MomentField } from "../controls/moment-field.tsx";
import { unitOf } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { focusOn } from "../shell/focus.ts";
import { ProblemSummary } from "../shell/problem-summary.tsx";
import { type ChangeKind, changeKinds, kindOfChange, readChangeDraft } from "./change-draft.ts";

interface ChangeEditorProps {
  readonly id: string;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly title: string;
  readonly onDraft: (fields: Draft) => void;
  readonly onApply: (change: DatedEliminationChange) => void;
  readonly onCancel: () => void;
}

/** Adds or edits one change of elimination. What is typed stays in it until it is right or given up. */
export function ChangeEditor({ id, draft, timeZone, title, onDraft, onApply, onCancel }: ChangeEditorProps) {
  const checked = useSignal(false);
  const kind = kindOfChange(draft);
  const read = readChangeDraft(draft, id, timeZone);
  const problems = checked.value && !read.ok ? read.problems : {};
  const name = (field: string) => `change-${id}-${field}`;
  const apply = (event: Event) => {
    event.preventDefault();
    checked.value = true;
    if (read.ok) onApply(read.change);
    else focusOn(`change-${id}-problems`);
  };
  return (
    <form class="editor" noValidate onSubmit={apply} aria-label={title}>
      <h3>{title}</h3>
      <ProblemSummary id={`change-${id}-problems`} problems={problems} fieldId={name} />
      <ChoiceField
        id={name("kind")}
        legend="What changes"
        value={kind}
        choices={(Object.keys(changeKinds) as ChangeKind[]).map((value) => ({
          value,
          label: changeKinds[value].label,
        }))}
        onChoice={(value) => onDraft({ kind: value })}
      />
      <div class="fields">
        <TextField
          id={name("value")}
          label={changeKinds[kind].value}
          unit={unitOf(changeKinds[kind].limit)}
          mode="decimal"
          text={textIn(draft, "value")}
          onText={(value) => onDraft({ value })}
          problem={problems["value"]}
        />
        <MomentField
          id={name("from")}
          label="From"
          moment={momentIn(draft, "from")}
          timeZone={timeZone}
          onMoment={(moment) => onDraft(momentFields("from", moment))}
          problem={problems["from"]}
          emptiness="allowed"
        />
        {kind === "added-clearance" && (
          <MomentField
            id={name("until")}
            label="Until"
            moment={momentIn(draft, "until")}
            timeZone={timeZone}
            onMoment={(moment) => onDraft(momentFields("until", moment))}
            problem={problems["until"]}
            emptiness="allowed"
          />
        )}
        <TextField
          id={name("note")}
          label="Where it came from"
          text={textIn(draft, "note")}
          onText={(note) => onDraft({ note })}
          longest={counts.noteCharacters}
        />
      </div>
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
