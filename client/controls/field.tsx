import type { ComponentChildren } from "preact";
import type { Caution } from "../../shared/contract/caution.ts";
import "./field.css";

export interface FieldWords {
  readonly id: string;
  readonly label: string;
  /** What to put in, in a few words; always visible. */
  readonly hint?: string | undefined;
  /** Field, value and what is allowed; undefined while all is well. */
  readonly problem?: string | undefined;
  readonly cautions?: readonly Caution[] | undefined;
  /** Something said about the value that is neither wrong nor a caution: "Sun 29 Mar 2026 08:00". */
  readonly reading?: string | undefined;
}

/** The ids an input must name in aria-describedby, in the order they are shown; undefined if none. */
export function describedBy({ id, hint, problem, cautions, reading }: FieldWords): string | undefined {
  const ids = [
    problem && `${id}-problem`,
    cautions?.length && `${id}-cautions`,
    reading && `${id}-reading`,
    hint && `${id}-hint`,
  ];
  return ids.filter(Boolean).join(" ") || undefined;
}

/** A label, the control, and what there is to say about it. */
export function Field({ words, children }: { words: FieldWords; children: ComponentChildren }) {
  const { id, label, hint, problem, cautions, reading } = words;
  return (
    <div class={problem ? "field field-wrong" : "field"}>
      <label for={id}>{label}</label>
      {children}
      {problem && (
        <p class="field-problem" id={`${id}-problem`}>
          <span class="mark">Not accepted:</span> {problem}
        </p>
      )}
      {cautions !== undefined && cautions.length > 0 && (
        <ul class="field-cautions" id={`${id}-cautions`}>
          {cautions.map((caution) => (
            <li key={caution.code} class={`caution-${caution.severity}`}>
              {caution.text}
            </li>
          ))}
        </ul>
      )}
      {reading && (
        <p class="field-reading" id={`${id}-reading`}>
          {reading}
        </p>
      )}
      {hint && (
        <p class="field-hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
    </div>
  );
}
