import { formatDose, formatDuration, formatRate } from "../../shared/units/format.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { readLimited } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { giveKindOf, giveKinds } from "./give-draft.ts";
import { PumpLogField } from "./pump-log-field.tsx";

interface GiveFieldsProps {
  readonly name: (field: string) => string;
  readonly draft: Draft;
  readonly problems: Readonly<Record<string, string>>;
  readonly onDraft: (fields: Draft) => void;
}

/** What is given: its kind, and its amount and duration or its log. */
export function GiveFields({ name, draft, problems, onDraft }: GiveFieldsProps) {
  const kind = giveKindOf(draft);
  return (
    <>
      <ChoiceField
        id={name("kind")}
        legend="What is given"
        value={kind}
        choices={giveKinds}
        onChoice={(value) => onDraft({ kind: value })}
      />
      {kind === "pump" ? (
        <PumpLogField
          id={name("pump")}
          text={textIn(draft, "pump")}
          problem={problems["pump"]}
          onText={(pump) => onDraft({ pump })}
        />
      ) : (
        <div class="fields">
          <AmountField
            id={name("amount")}
            label="Amount"
            text={textIn(draft, "amount")}
            problem={problems["amount"]}
            onText={(amount) => onDraft({ amount })}
          />
          {kind === "infusion" && (
            <DurationField
              id={name("duration")}
              label="Infusion duration"
              text={textIn(draft, "duration")}
              amountText={textIn(draft, "amount")}
              problem={problems["duration"]}
              onText={(duration) => onDraft({ duration })}
            />
          )}
        </div>
      )}
    </>
  );
}

interface PartProps {
  readonly id: string;
  readonly label: string;
  readonly text: string;
  readonly problem?: string | undefined;
  readonly hint?: string | undefined;
  readonly onText: (text: string) => void;
}

/** An amount, read back as a sheet writes it: 0.125 mg is 125 microgram. */
export function AmountField(props: PartProps) {
  const read = readLimited("amountMg", props.text);
  return <TextField {...props} unit="mg" mode="decimal" reading={read.ok ? formatDose(read.value) : undefined} />;
}

/** A duration, read back in minutes, with the rate it makes of the amount. */
export function DurationField({ amountText, ...props }: PartProps & { readonly amountText: string }) {
  const read = readLimited("durationH", props.text);
  const amount = readLimited("amountMg", amountText);
  const rate = read.ok && amount.ok ? `, ${formatRate(amount.value / read.value)}` : "";
  return (
    <TextField
      {...props}
      unit="h"
      mode="decimal"
      reading={read.ok ? `${formatDuration(read.value)}${rate}` : undefined}
    />
  );
}
