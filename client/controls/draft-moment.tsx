import { type Draft, momentFields, momentIn } from "../case/drafts.ts";
import { MomentField } from "./moment-field.tsx";

interface DraftMomentProps {
  /** Name of the part of the draft that holds the time. */
  readonly field: string;
  readonly label: string;
  readonly hint?: string;
  readonly name: (field: string) => string;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly problems: Readonly<Record<string, string>>;
  readonly onDraft: (fields: Draft) => void;
}

/** A date and time within a draft. Empty says nothing wrong until the draft is applied. */
export function DraftMoment({ field, label, hint, name, draft, timeZone, problems, onDraft }: DraftMomentProps) {
  return (
    <MomentField
      id={name(field)}
      label={label}
      moment={momentIn(draft, field)}
      timeZone={timeZone}
      onMoment={(moment) => onDraft(momentFields(field, moment))}
      problem={problems[field]}
      emptiness="allowed"
      hint={hint}
    />
  );
}
