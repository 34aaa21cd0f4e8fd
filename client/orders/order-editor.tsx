import { useSignal } from "@preact/signals";
import { counts } from "../../shared/contract/limits.ts";
import type { Order } from "../../shared/contract/schedule.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { TextField } from "../controls/text-field.tsx";
import { focusOn } from "../shell/focus.ts";
import { ProblemSummary } from "../shell/problem-summary.tsx";
import { GiveFields } from "./give-fields.tsx";
import { readOrderDraft } from "./order-draft.ts";
import { WhenFields } from "./when-fields.tsx";

interface OrderEditorProps {
  /** Distinguishes the ids of its fields from those of other open editors. */
  readonly id: string;
  readonly title: string;
  readonly draft: Draft;
  readonly kept: Pick<Order, "id" | "exceptions">;
  readonly timeZone: string;
  readonly onDraft: (fields: Draft) => void;
  readonly onApply: (order: Order) => void;
  readonly onCancel: () => void;
}

/** A pump log happens once, unless an interval was already written. */
function withUsualWhen(draft: Draft, fields: Draft): Draft {
  return fields["kind"] === "pump" && textIn(draft, "interval") === "" ? { ...fields, when: "once" } : fields;
}

/** Writes or changes one order. What is typed stays in it until it is right or given up. */
export function OrderEditor({ id, title, draft, kept, timeZone, onDraft, onApply, onCancel }: OrderEditorProps) {
  const checked = useSignal(false);
  const read = readOrderDraft(draft, kept, timeZone);
  const problems = checked.value && !read.ok ? read.problems : {};
  const name = (field: string) => `order-${id}-${field.replace(".", "-")}`;
  const apply = (event: Event) => {
    event.preventDefault();
    checked.value = true;
    if (read.ok) onApply(read.order);
    else focusOn(name("problems"));
  };
  return (
    <form class="editor" noValidate onSubmit={apply} aria-label={title}>
      <h3>{title}</h3>
      <ProblemSummary id={name("problems")} problems={problems} fieldId={name} />
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
