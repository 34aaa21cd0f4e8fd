import { useSignal } from "@preact/signals";
import { describedBy, Field, type FieldWords } from "./field.tsx";
import { oncePointerRests } from "./pointer-rest.ts";
import { lengthProblem } from "./text-length.ts";

/** "typing": every key; "settled": the person left the field or pressed Enter. */
export type TypingStage = "typing" | "settled";

export interface TextFieldProps extends FieldWords {
  readonly text: string;
  readonly onText: (text: string, stage: TypingStage) => void;
  readonly unit?: string | undefined;
  /** "decimal" brings up the digits on a touch keyboard; what is typed stays free text. */
  readonly mode?: "text" | "decimal" | "numeric";
  readonly lines?: number;
  /** Id of a datalist. */
  readonly suggestions?: string;
  /** A longer text is refused, never cut off. */
  readonly longest?: number;
  readonly required?: boolean;
}

/**
 * A text input that always shows what was typed. While the person is typing, a problem is held back, since
 * half a number is not yet a wrong one; it is shown once the field is left or Enter is pressed.
 */
export function TextField(props: TextFieldProps) {
  const typed = useSignal<string | undefined>(undefined);
  const settle = () => {
    typed.value = undefined;
  };
  const typing = typed.value !== undefined;
  const tooLong =
    props.longest === undefined ? undefined : lengthProblem(props.label, typed.value ?? props.text, props.longest);
  const words = { ...props, problem: typing ? tooLong : (props.problem ?? tooLong) };
  const shared = {
    id: props.id,
    value: typed.value ?? props.text,
    "aria-invalid": Boolean(words.problem),
    "aria-describedby": describedBy(words),
    required: props.required,
    autocomplete: "off",
    onInput: (event: { currentTarget: { value: string } }) => {
      typed.value = event.currentTarget.value;
      props.onText(event.currentTarget.value, "typing");
    },
    onChange: (event: { currentTarget: { value: string } }) => {
      props.onText(event.currentTarget.value, "settled");
      oncePointerRests(settle);
    },
    onBlur: () => oncePointerRests(settle),
  } as const;
  return (
    <Field words={words}>
      {props.lines === undefined ? (
        <span class="with-unit">
          <input {...shared} type="text" inputMode={props.mode ?? "text"} list={props.suggestions} />
          {props.unit && <span class="unit">{props.unit}</span>}
        </span>
      ) : (
        <textarea {...shared} rows={props.lines} />
      )}
    </Field>
  );
}
