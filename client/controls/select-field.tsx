import { describedBy, Field, type FieldWords } from "./field.tsx";

interface SelectFieldProps extends FieldWords {
  readonly value: string;
  readonly choices: readonly { readonly value: string; readonly label: string }[];
  readonly onChoice: (value: string) => void;
}

/** One of many choices. */
export function SelectField(props: SelectFieldProps) {
  return (
    <Field words={props}>
      <select
        id={props.id}
        value={props.value}
        aria-invalid={Boolean(props.problem)}
        aria-describedby={describedBy(props)}
        onChange={(event) => props.onChoice(event.currentTarget.value)}
      >
        {props.choices.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
    </Field>
  );
}
