import { counts } from "../../shared/contract/limits.ts";
import type { Order } from "../../shared/contract/schedule.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { TextField } from "../controls/text-field.tsx";
import { DraftForm, type EditorProps } from "../shell/draft-form.tsx";
import { GiveFields } from "./give-fields.tsx";
import { readOrderDraft } from "./order-draft.ts";
import { WhenFields } from "./when-fields.tsx";

interface OrderEditorProps extends EditorProps<Order> {
  /** Distinguishes the ids of its fields from those of other open editors. */
  readonly id: string;
  readonly kept: Pick<Order, "id" | "exceptions">;
}

/** A pump log happens once, unless an interval was already written. */
function withUsualWhen(draft: Draft, fields: Draft): Draft {
  return fields["kind"] === "pump" && textIn(draft, "interval") === "" ? { ...fields, when: "once" } : fields;
}

/** Writes or changes one order. What is typed stays in it until it is right or given up. */
export function OrderEditor({ id, title, draft, kept, timeZone, onDraft, onApply, onCancel }: OrderEditorProps) {
  const read = readOrderDraft(draft, kept, timeZone);
  const name = (field: string) => `order-${id}-${field.replace(".", "-")}`;
  return (
    <DraftForm title={title} read={read} name={name} onApply={() => read.ok && onApply(read.order)} onCancel={onCancel}>
      {(problems) => (
        <>
          <GiveFields
            name={name}
            draft={draft}
            problems={problems}
            onDraft={(fields) => onDraft(withUsualWhen(draft, fields))}
          />
          <WhenFields name={name} draft={draft} timeZone={timeZone} problems={problems} onDraft={onDraft} />
          <TextField
            id={name("note")}
            label="Note"
            text={textIn(draft, "note")}
            onText={(note) => onDraft({ note })}
            longest={counts.noteCharacters}
          />
          {kept.exceptions.length > 0 && (
            <p class="soft">
              {kept.exceptions.length === 1
                ? "One dose of this order is"
                : `${kept.exceptions.length} doses of this order are`}{" "}
              planned otherwise; that stays with the number of the dose, counted from the order's first.
            </p>
          )}
        </>
      )}
    </DraftForm>
  );
}
