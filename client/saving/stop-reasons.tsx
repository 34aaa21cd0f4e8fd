import { useComputed } from "@preact/signals";
import type { Caution } from "../../shared/contract/caution.ts";
import { counts } from "../../shared/contract/limits.ts";
import { type Alternative, withAlternative } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { TextField } from "../controls/text-field.tsx";
import { isAbout } from "./is-about.ts";

interface StopReasonsProps {
  readonly page: CasePage;
  readonly problems: Readonly<Record<string, string>>;
}

/** Each caution that stops, with the reason for going on all the same. */
export function StopReasons({ page, problems }: StopReasonsProps) {
  const selected = page.selected.value;
  const reasons = useComputed(() => reasonsNow(page)).value;
  const stops = stopsOf(page.judged.value.cautions);
  if (selected === undefined || stops.length === 0) return null;
  return (
    <section class="stops" aria-labelledby="stops-title">
      <h3 id="stops-title" tabIndex={-1}>
        Reasons for going on
      </h3>
      <p class="soft">Each of these must be put right, or answered with a reason, which is printed on the sheet.</p>
      {stops.map((stop, index) => (
        <div class="stop" key={reasonField(index)}>
          <p>
            <strong>Stop:</strong> {stop.text}
          </p>
          <TextField
            id={reasonField(index)}
            label="Reason for going on"
            text={reasonFor(reasons, stop)}
            onText={(reason) =>
              page.model.change(
                "reason for going on",
                (document) => withAlternative(document, selected.key, (each) => withReason(each, stop, reason)),
                `reason ${stop.code} ${stop.about}`,
              )
            }
            problem={problems[reasonField(index)]}
            hint={sayEarlier(reasons, stop)}
            longest={counts.noteCharacters}
          />
        </div>
      ))}
    </section>
  );
}

/** Cautions that must be answered; one that says the same about the same thing is answered once. */
export function stopsOf(cautions: readonly Caution[]): Caution[] {
  const stops = cautions.filter(({ severity }) => severity === "stop");
  return stops.filter((stop, index) => stops.findIndex((other) => isAbout(other, stop)) === index);
}

/** Id of the field that the stop at this place is answered in. */
export function reasonField(index: number): string {
  return `stop-reason-${index + 1}`;
}

type Reasons = Alternative["cautionReasons"];

/** As typed this moment; an array of the document keeps its identity while nothing in it changes. */
function reasonsNow({ model, selected }: CasePage): Reasons {
  return model.document.value.alternatives.find(({ key }) => key === selected.value?.key)?.cautionReasons ?? none;
}

const none: Reasons = [];

function reasonFor(reasons: Reasons, stop: Caution): string {
  return reasons.find((each) => isAbout(each, stop))?.reason ?? "";
}

function sayEarlier(reasons: Reasons, stop: Caution): string | undefined {
  const earlier = reasons.find((each) => each.code === stop.code && each.about === stop.about && !isAbout(each, stop));
  return earlier && `given before, for another value: ${earlier.reason}`;
}

function withReason(alternative: Alternative, stop: Caution, reason: string): Alternative {
  const { code, about, text } = stop;
  const others = alternative.cautionReasons.filter((each) => !isAbout(each, stop));
  return { ...alternative, cautionReasons: reason === "" ? others : [...others, { code, about, text, reason }] };
}
