import type { Caution } from "../../shared/contract/caution.ts";
import { sayClock, sayOffset, sayTime } from "../../shared/schedule/clock.ts";
import { ChoiceField } from "./choice-field.tsx";
import { type MomentText, type ReadMoment, readMoment } from "./moment.ts";
import { TextField, type TypingStage } from "./text-field.tsx";

interface MomentFieldProps {
  readonly id: string;
  readonly label: string;
  readonly moment: MomentText;
  readonly timeZone: string;
  readonly onMoment: (moment: MomentText, stage: TypingStage) => void;
  readonly hint?: string | undefined;
  readonly problem?: string | undefined;
  /** An empty field says nothing wrong. */
  readonly emptiness?: "allowed" | "refused";
}

/**
 * A date and 24-hour time, typed. What was understood stands below it, with its offset; where the clock
 * jumps, a caution says how the time was read, and of a time that comes twice the second can be chosen.
 */
export function MomentField(props: MomentFieldProps) {
  const { id, label, moment, timeZone, onMoment, hint } = props;
  const read = readMoment(moment, timeZone, label);
  const quiet = moment.text.trim() === "" && props.emptiness === "allowed";
  const problem = props.problem ?? (read.ok || quiet ? undefined : read.problem);
  return (
    <div class="moment">
      <TextField
        id={id}
        label={label}
        text={moment.text}
        onText={(text, stage) => onMoment({ text }, stage)}
        hint={hint ?? "24-hour, such as 2026-03-29 08:00"}
        problem={problem}
        reading={read.ok ? sayInstant(read.instant, timeZone) : undefined}
        cautions={jumpCautions(read, timeZone, id)}
      />
      {read.ok && read.second !== undefined && (
        <ChoiceField
          id={`${id}-which`}
          legend={`Which ${sayTime(read.instant, timeZone)}`}
          value={read.instant === read.second ? "second" : "first"}
          choices={[
            { value: "first", label: "the first" },
            { value: "second", label: "the second, after the clock went back" },
          ]}
          onChoice={(which) =>
            onMoment(
              which === "second" && read.second ? { text: moment.text, instant: read.second } : { text: moment.text },
              "settled",
            )
          }
        />
      )}
    </div>
  );
}

/** "Sun 29 Mar 2026 08:00 (UTC+01:00)": the offset tells the two 01:30 of an autumn night apart. */
export function sayInstant(instant: string, timeZone: string): string {
  const said = sayClock(instant, timeZone);
  return said.endsWith(")") ? said : `${said} (UTC${sayOffset(instant, timeZone)})`;
}

function jumpCautions(read: ReadMoment, timeZone: string, about: string): Caution[] {
  if (!read.ok || read.resolution === "exact") return [];
  const time = sayTime(read.instant, timeZone);
  const text =
    read.resolution === "skipped"
      ? `This clock time does not exist that day: the clock goes forward. It is read as ${time}.`
      : `${time} comes twice that day: the clock goes back. The first is meant unless you choose the second.`;
  return [{ code: `clock-${read.resolution}`, severity: "warn", text, about }];
}
