import "./field.css";

interface ChoiceFieldProps<Value extends string> {
  readonly id: string;
  readonly legend: string;
  readonly value: string;
  readonly choices: readonly { readonly value: Value; readonly label: string }[];
  readonly onChoice: (value: Value) => void;
}

/** A few choices of which one holds, all of them in view. */
export function ChoiceField<Value extends string>({ id, legend, value, choices, onChoice }: ChoiceFieldProps<Value>) {
  return (
    <fieldset class="choices">
      <legend>{legend}</legend>
      <div class="choice-row">
        {choices.map((choice) => (
          <label class="choice" key={choice.value}>
            <input
              type="radio"
              id={`${id}-${choice.value}`}
              name={id}
              value={choice.value}
              checked={choice.value === value}
              onChange={() => onChoice(choice.value)}
            />
            {choice.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
