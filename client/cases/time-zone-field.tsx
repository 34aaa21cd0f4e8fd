import { TextField, type TypingStage } from "../controls/text-field.tsx";

interface TimeZoneFieldProps {
  readonly id: string;
  readonly text: string;
  readonly onText: (text: string, stage: TypingStage) => void;
  readonly problem?: string | undefined;
  /** Follows the words on what the zone is for. */
  readonly warning?: string | undefined;
}

/** A time zone by its IANA name, with the names this browser knows as suggestions. */
export function TimeZoneField({ id, text, onText, problem, warning }: TimeZoneFieldProps) {
  const names = Intl.supportedValuesOf("timeZone");
  return (
    <>
      <TextField
        id={id}
        label="Time zone"
        text={text}
        onText={onText}
        problem={problem}
        suggestions={`${id}-names`}
        hint={["where the doses are given, such as Europe/London; clock times follow its daylight saving", warning]
          .filter(Boolean)
          .join(". ")}
      />
      <datalist id={`${id}-names`}>
        {["UTC", ...names].map((name) => (
          <option key={name} value={name} />
        ))}
      </datalist>
    </>
  );
}

/** Why a text is no time zone that this browser can reckon with; undefined where it is one. */
export function timeZoneProblem(text: string): string | undefined {
  const allowed = "must be an IANA name such as Europe/London";
  const name = text.trim();
  if (name === "") return `Time zone is empty; it ${allowed}`;
  // Offsets and old aliases hide the rules of daylight saving.
  if (name !== "UTC" && !/^[A-Za-z_]+(\/[A-Za-z0-9_+-]+)+$/.test(name)) return `Time zone ${allowed}, got ${name}`;
  try {
    new Intl.DateTimeFormat("en-GB", { timeZone: name });
    return undefined;
  } catch {
    return `Time zone ${allowed}, got ${name}, which this browser does not know`;
  }
}
