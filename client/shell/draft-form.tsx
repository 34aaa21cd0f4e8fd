import { useSignal } from "@preact/signals";
import type { ComponentChildren } from "preact";
import type { Draft } from "../case/drafts.ts";
import { focusOn } from "./focus.ts";
import { ProblemSummary } from "./problem-summary.tsx";

/** What every editor of one part is given: what is typed, and what to do with it. */
export interface EditorProps<Value> {
  readonly title: string;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly onDraft: (fields: Draft) => void;
  readonly onApply: (value: Value) => void;
  readonly onCancel: () => void;
}

type Problems = Readonly<Record<string, string>>;

interface DraftFormProps {
  readonly title: string;
  /** What the draft says, or every problem in it by field. */
  readonly read: { readonly ok: true } | { readonly ok: false; readonly problems: Problems };
  /** Id of a field of this editor. */
  readonly name: (field: string) => string;
  /** Called only when the draft is right. */
  readonly onApply: () => void;
  readonly onCancel: () => void;
  readonly children: (problems: Problems) => ComponentChildren;
}

/**
 * An editor that is applied or given up. Problems are held back until somebody applies; then they are listed,
 * each leading to its field, and what is typed stays.
 */
export function DraftForm({ title, read, name, onApply, onCancel, children }: DraftFormProps) {
  const checked = useSignal(false);
  const problems = checked.value && !read.ok ? read.problems : {};
  const apply = (event: Event) => {
    event.preventDefault();
    checked.value = true;
    if (read.ok) onApply();
    else focusOn(name("problems"));
  };
  return (
    <form class="editor" noValidate onSubmit={apply} aria-label={title}>
      <h3>{title}</h3>
      <ProblemSummary id={name("problems")} problems={problems} fieldId={name} />
      {children(problems)}
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
