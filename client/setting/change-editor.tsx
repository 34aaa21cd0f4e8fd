import { counts } from "../../shared/contract/limits.ts";
import type { DatedEliminationChange } from "../../shared/contract/setting.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import { textIn } from "../case/drafts.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { DraftMoment } from "../controls/draft-moment.tsx";
import { TextField } from "../controls/text-field.tsx";
import { DraftForm, type EditorProps } from "../shell/draft-form.tsx";
import { type ChangeKind, changeKinds, kindOfChange, readChangeDraft } from "./change-draft.ts";

interface ChangeEditorProps extends EditorProps<DatedEliminationChange> {
  readonly id: string;
}

/** Adds or edits one change of elimination. What is typed stays in it until it is right or given up. */
export function ChangeEditor({ id, draft, timeZone, title, onDraft, onApply, onCancel }: ChangeEditorProps) {
  const kind = kindOfChange(draft);
  const read = readChangeDraft(draft, id, timeZone);
  const name = (field: string) => `change-${id}-${field}`;
  const parts = { name, draft, timeZone, onDraft };
  return (
    <DraftForm
      title={title}
      read={read}
      name={name}
      onApply={() => read.ok && onApply(read.change)}
      onCancel={onCancel}
    >
      {(problems) => (
        <>
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
              unit={printedUnit(changeKinds[kind].limit)}
              mode="decimal"
              text={textIn(draft, "value")}
              onText={(value) => onDraft({ value })}
              problem={problems["value"]}
            />
            <DraftMoment {...parts} problems={problems} field="from" label="From" />
            {kind === "added-clearance" && <DraftMoment {...parts} problems={problems} field="until" label="Until" />}
            <TextField
              id={name("note")}
              label="Where it came from"
              text={textIn(draft, "note")}
              onText={(note) => onDraft({ note })}
              longest={counts.noteCharacters}
            />
          </div>
        </>
      )}
    </DraftForm>
  );
}
