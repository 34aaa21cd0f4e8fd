import { counts } from "../../shared/contract/limits.ts";
import type { StatedText } from "../case/setting-form.ts";
import { TextField } from "../controls/text-field.tsx";

interface StatedRowProps {
  readonly id: string;
  readonly label: string;
  readonly unit: string;
  readonly stated: StatedText;
  readonly onStated: (stated: StatedText, field: "value" | "note") => void;
  readonly problem?: string | undefined;
  readonly reading?: string | undefined;
  readonly hint?: string | undefined;
}

/** A value and, beside it, where it came from. */
export function StatedRow({ id, label, unit, stated, onStated, problem, reading, hint }: StatedRowProps) {
  return (
    <div class="stated" role="group" aria-label={label}>
      <TextField
        id={id}
        label={label}
        unit={unit}
        mode="decimal"
        text={stated.text}
        onText={(text) => onStated({ ...stated, text }, "value")}
        problem={problem}
        reading={reading}
        hint={hint}
      />
      <TextField
        id={`${id}-note`}
        label="Where it came from"
        text={stated.note}
        onText={(note) => onStated({ ...stated, note }, "note")}
        longest={counts.noteCharacters}
      />
    </div>
  );
}
