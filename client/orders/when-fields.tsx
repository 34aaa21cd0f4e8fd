import { counts } from "../../shared/contract/limits.ts";
import { formatDose, formatDuration } from "../../shared/units/format.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { DraftMoment } from "../controls/draft-moment.tsx";
import { readLimited } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { focusOn } from "../shell/focus.ts";
import { giveKindOf } from "./give-draft.ts";
import { endKindOf, timeRows, whenKindOf } from "./order-draft.ts";

interface WhenFieldsProps {
  readonly name: (field: string) => string;
  readonly draft: Draft;
  readonly timeZone: string;
  readonly problems: Readonly<Record<string, string>>;
  readonly onDraft: (fields: Draft) => void;
}

/** When it is given: once, every so many hours or at clock times; from when, and until when. */
export function WhenFields(props: WhenFieldsProps) {
  const { name, draft, problems, onDraft } = props;
  const when = whenKindOf(draft);
  const interval = readLimited("intervalH", textIn(draft, "interval"));
  return (
    <>
      <ChoiceField
        id={name("when")}
        legend="When"
        value={when}
        choices={[
          { value: "once", label: "once" },
          { value: "every", label: "every so many hours" },
          { value: "clock-times", label: "at clock times of the day" },
        ]}
        onChoice={(value) => onDraft({ when: value })}
      />
      <div class="fields">
        <DraftMoment {...props} field="at" label={when === "once" ? "Given at" : "From"} />
        {when === "every" && (
          <TextField
            id={name("interval")}
            label="Interval"
            unit="h"
            mode="decimal"
            text={textIn(draft, "interval")}
            onText={(text) => onDraft({ interval: text })}
            problem={problems["interval"]}
            reading={
              interval.ok
                ? `every ${formatDuration(interval.value)} of elapsed time, whatever the clock does`
                : undefined
            }
          />
        )}
      </div>
      {when === "clock-times" && <ClockTimes {...props} />}
      {when !== "once" && <EndFields {...props} />}
    </>
  );
}

function ClockTimes({ name, draft, problems, onDraft }: WhenFieldsProps) {
  const rows = timeRows(draft);
  const amounts = giveKindOf(draft) !== "pump";
  return (
    <fieldset class="choices clock-times">
      <legend>Clock times, kept whatever daylight saving does</legend>
      {Array.from({ length: rows }, (_, row) => {
        const amount = readLimited("amountMg", textIn(draft, `amount.${row}`));
        return (
          <div class="clock-time" key={row}>
            <TextField
              id={name(`time.${row}`)}
              label={`Clock time ${row + 1}`}
              text={textIn(draft, `time.${row}`)}
              onText={(text) => onDraft({ [`time.${row}`]: text })}
              problem={problems[`time.${row}`]}
              hint="24-hour, such as 08:00"
            />
            {amounts && (
              <TextField
                id={name(`amount.${row}`)}
                label="Amount then, where it differs"
                unit="mg"
                mode="decimal"
                text={textIn(draft, `amount.${row}`)}
                onText={(text) => onDraft({ [`amount.${row}`]: text })}
                problem={problems[`amount.${row}`]}
                reading={amount.ok ? formatDose(amount.value) : undefined}
              />
            )}
          </div>
        );
      })}
      <button
        type="button"
        class="button"
        disabled={rows >= counts.clockTimesPerOrder}
        onClick={() => {
          onDraft({ times: String(rows + 1) });
          focusOn(name(`time.${rows}`));
        }}
      >
        One more clock time
      </button>
    </fieldset>
  );
}

function EndFields(props: WhenFieldsProps) {
  const { name, draft, problems, onDraft } = props;
  const end = endKindOf(draft);
  return (
    <>
      <ChoiceField
        id={name("end")}
        legend="Until"
        value={end}
        choices={[
          { value: "open", label: "open, to the end of the plan" },
          { value: "until", label: "a time" },
          { value: "count", label: "a number of doses" },
        ]}
        onChoice={(value) => onDraft({ end: value })}
      />
      {end !== "open" && (
        <div class="fields">
          {end === "count" ? (
            <TextField
              id={name("doses")}
              label="Number of doses"
              mode="numeric"
              text={textIn(draft, "doses")}
              onText={(text) => onDraft({ doses: text })}
              problem={problems["doses"]}
              hint="doses that are left out count too"
            />
          ) : (
            <DraftMoment
              {...props}
              field="until"
              label="Until"
              hint="24-hour, such as 2026-04-01 08:00; nothing is given at that time or later"
            />
          )}
        </div>
      )}
    </>
  );
}
