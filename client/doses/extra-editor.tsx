import { counts } from "../../shared/contract/limits.ts";
import type { ExtraDose } from "../../shared/contract/schedule.ts";
import { textIn } from "../case/drafts.ts";
import { DraftMoment } from "../controls/draft-moment.tsx";
import { TextField } from "../controls/text-field.tsx";
import { GiveFields } from "../orders/give-fields.tsx";
import { DraftForm, type EditorProps } from "../shell/draft-form.tsx";
import { readExtraDraft } from "./extra-draft.ts";

interface ExtraEditorProps extends EditorProps<ExtraDose> {
  readonly id: string;
}

/** A dose that was given and that nobody planned. */
export function ExtraEditor({ id, title, draft, timeZone, onDraft, onApply, onCancel }: ExtraEditorProps) {
  const read = readExtraDraft(draft, id, timeZone);
  const name = (field: string) => `extra-${id}-${field}`;
  const parts = { name, draft, timeZone, onDraft };
  return (
    <DraftForm title={title} read={read} name={name} onApply={() => read.ok && onApply(read.extra)} onCancel={onCancel}>
      {(problems) => (
        <>
          <div class="fields">
            <DraftMoment {...parts} problems={problems} field="at" label="Given at" />
          </div>
          <GiveFields name={name} draft={draft} problems={problems} onDraft={onDraft} />
          <TextField
            id={name("note")}
            label="Note"
            text={textIn(draft, "note")}
            onText={(note) => onDraft({ note })}
            longest={counts.noteCharacters}
          />
        </>
      )}
    </DraftForm>
  );
}
