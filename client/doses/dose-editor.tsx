import { counts } from "../../shared/contract/limits.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { plainText } from "../case/form-of-setting.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { DraftMoment } from "../controls/draft-moment.tsx";
import { TextField } from "../controls/text-field.tsx";
import { AmountField, DurationField } from "../orders/give-fields.tsx";
import { DraftForm, type EditorProps } from "../shell/draft-form.tsx";
import { type DoseEdit, givenChoiceOf, type OrderedDose, planChoiceOf, readDoseDraft } from "./dose-draft.ts";

interface DoseEditorProps extends EditorProps<DoseEdit> {
  readonly dose: OrderedDose;
}

/** One scheduled dose: planned otherwise than the rest of its order, and what was given of it. */
export function DoseEditor({ dose, title, draft, timeZone, onDraft, onApply, onCancel }: DoseEditorProps) {
  const read = readDoseDraft(draft, dose, timeZone);
  const name = (field: string) => `dose-${dose.orderId}-${dose.occurrence}-${field}`;
  const parts = { dose, draft, timeZone, onDraft, name };
  return (
    <DraftForm title={title} read={read} name={name} onApply={() => read.ok && onApply(read.edit)} onCancel={onCancel}>
      {(problems) => (
        <>
          <ChoiceField
            id={name("given")}
            legend="What was given"
            value={givenChoiceOf(draft)}
            choices={[
              { value: "none", label: "nothing recorded" },
              { value: "as-planned", label: "given as planned" },
              { value: "changed", label: "given otherwise" },
              { value: "omitted", label: "omitted" },
            ]}
            onChoice={(given) => onDraft({ given })}
          />
          {givenChoiceOf(draft) === "changed" && <Parts {...parts} problems={problems} prefix="given" />}
          <ChoiceField
            id={name("plan")}
            legend="What is planned"
            value={planChoiceOf(draft)}
            choices={[
              { value: "as-rest", label: "as the rest of its order" },
              { value: "changed", label: "otherwise" },
              { value: "left-out", label: "left out" },
            ]}
            onChoice={(plan) => onDraft({ plan })}
          />
          {planChoiceOf(draft) === "changed" && <Parts {...parts} problems={problems} prefix="plan" />}
          <TextField
            id={name("note")}
            label="Note on what was given"
            text={textIn(draft, "note")}
            onText={(note) => onDraft({ note })}
            longest={counts.noteCharacters}
          />
        </>
      )}
    </DraftForm>
  );
}

interface PartsProps {
  readonly dose: OrderedDose;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly problems: Readonly<Record<string, string>>;
  readonly prefix: "given" | "plan";
  readonly name: (field: string) => string;
  readonly onDraft: (fields: Draft) => void;
}

function Parts(props: PartsProps) {
  const { dose, draft, problems, prefix, name, onDraft } = props;
  const { give } = dose;
  const field = (part: string) => `${prefix}-${part}`;
  const amountText = textIn(draft, field("amount"));
  return (
    <div class="fields">
      <DraftMoment
        {...props}
        field={field("at")}
        label="Time"
        hint="24-hour, such as 2026-03-29 08:00; empty: the time stays"
      />
      {give.kind !== "pump" && (
        <AmountField
          id={name(field("amount"))}
          label="Amount"
          text={amountText}
          hint="empty: the amount stays"
          problem={problems[field("amount")]}
          onText={(text) => onDraft({ [field("amount")]: text })}
        />
      )}
      {give.kind === "infusion" && (
        <DurationField
          id={name(field("duration"))}
          label="Infusion duration"
          text={textIn(draft, field("duration"))}
          amountText={amountText || plainText(give.amountMg)}
          hint="empty: the duration stays"
          problem={problems[field("duration")]}
          onText={(text) => onDraft({ [field("duration")]: text })}
        />
      )}
    </div>
  );
}
