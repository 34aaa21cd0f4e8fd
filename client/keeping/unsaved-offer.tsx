import type { WholeCase } from "../../shared/contract/answers.ts";
import { sayInstant } from "../controls/moment-field.tsx";
import type { KeptWork } from "./unsaved-form.ts";
import "./unsaved-offer.css";

interface UnsavedOfferProps {
  readonly whole: WholeCase;
  /** The kept text as it is, for what cannot be read any more. */
  readonly text: string;
  /** Undefined where an older release wrote it or it is damaged. */
  readonly kept: KeptWork | undefined;
  readonly onTakeUp: (kept: KeptWork) => void;
  readonly onDiscard: () => void;
}

/** Asked before the case is shown, so that neither the old work nor the new overwrites the other. */
export function UnsavedOffer({ whole, text, kept, onTakeUp, onDiscard }: UnsavedOfferProps) {
  return (
    <section class="offer" aria-labelledby="offer-title">
      <h1 id="offer-title">Unsaved work on “{whole.case.label}”</h1>
      {kept === undefined ? <Unreadable text={text} /> : <Readable whole={whole} kept={kept} />}
      <div class="button-row">
        {kept !== undefined && (
          <button type="button" class="button button-main" onClick={() => onTakeUp(kept)}>
            Take it up
          </button>
        )}
        <button type="button" class="button" onClick={onDiscard}>
          Discard it and open the case as saved
        </button>
      </div>
    </section>
  );
}

function Readable({ whole, kept }: { whole: WholeCase; kept: KeptWork }) {
  const newer = kept.baseVersion < whole.case.version;
  const { alternatives } = kept.document;
  return (
    <>
      <p>
        This browser kept what was typed but not saved, last at {sayInstant(kept.keptAt, whole.case.timeZone)}. It has{" "}
        {alternatives.length === 1 ? "one alternative" : `${alternatives.length} alternatives`}:{" "}
        {alternatives.map(({ label }) => label).join(", ")}.
      </p>
      {newer && (
        <p>
          The case was saved again since then. When you save, you are shown what differs before anything is replaced.
        </p>
      )}
    </>
  );
}

function Unreadable({ text }: { text: string }) {
  const address = `data:application/json;charset=utf-8,${encodeURIComponent(text)}`;
  return (
    <>
      <p>
        This browser kept unsaved work, but another version of this program wrote it or it is damaged, so it cannot be
        taken up. Nothing of it is guessed.
      </p>
      <p>
        <a href={address} download="ebbline-unsaved.json">
          Download it as it is
        </a>{" "}
        to read what it holds.
      </p>
    </>
  );
}
