import { useComputed, useSignal } from "@preact/signals";
import { counts } from "../../shared/contract/limits.ts";
import { type Alternative, letterOf, withAlternative } from "../case/case-document.ts";
import { type CasePage, savedStateOf } from "../case/case-page.ts";
import { newId } from "../case/new-id.ts";
import { TextField } from "../controls/text-field.tsx";
import type { Failure } from "../http/answer.ts";
import { refusedAt } from "../saving/refused.ts";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { hasRoom, withCopy, withNewAlternative, withoutAlternative } from "./alternative-edits.ts";
import { retireAlternative } from "./retire.ts";
import { RetiredList } from "./retired-list.tsx";
import "./alternatives-part.css";

/** The alternatives by letter, which of them is being edited, and what can be done with it. */
export function AlternativesPart({ page }: { page: CasePage }) {
  const { model } = page;
  const failure = useSignal<Failure | undefined>(undefined);
  const document = page.settled.value;
  const selected = page.selected.value;
  const label = useComputed(
    () => model.document.value.alternatives.find(({ key }) => key === page.selected.value?.key)?.label ?? "",
  ).value;
  if (selected === undefined) return null;
  const letter = letterOf(document, selected.key);
  const room = hasRoom(document);
  const add = (what: string, copyOf: string | undefined) => {
    const key = newId();
    model.change(what, (now) => (copyOf === undefined ? withNewAlternative(now, key) : withCopy(now, copyOf, key)));
    model.selectedKey.value = key;
    focusOn("alternative-label");
  };
  const remove = async () => {
    if (selected.regimenId === undefined) {
      model.change(`alternative ${letter} removed`, (now) => withoutAlternative(now, selected.key));
    } else {
      failure.value = await retireAlternative(page, selected);
      if (failure.value === undefined) announce(`alternative ${letter} is retired; its revisions are kept`);
    }
    focusOn("alternatives-title");
  };
  return (
    <section class="part" aria-labelledby="alternatives-title">
      <h2 id="alternatives-title">Alternatives</h2>
      <fieldset class="letters">
        <legend>Which one is being edited below</legend>
        {document.alternatives.map((each) => (
          <label key={each.key} class={`letter letter-${letterOf(document, each.key).toLowerCase()}`}>
            <input
              type="radio"
              name="alternative"
              checked={each.key === selected.key}
              onChange={() => {
                model.selectedKey.value = each.key;
              }}
            />
            <strong>{letterOf(document, each.key)}</strong>
            <span>
              {each.label} <span class="soft">({sayState(page, each)})</span>
            </span>
          </label>
        ))}
      </fieldset>
      <div class="fields">
        <TextField
          id="alternative-label"
          label={`Name of alternative ${letter}`}
          text={label}
          onText={(text) =>
            model.change(
              `name of alternative ${letter}`,
              (now) => withAlternative(now, selected.key, (each) => ({ ...each, label: text })),
              `name ${selected.key}`,
            )
          }
          problem={
            label.trim() === "" ? `Name of alternative ${letter} is empty` : refusedAt(page, "alternative-label")
          }
          longest={counts.labelCharacters}
        />
      </div>
      <div class="button-row alternative-actions">
        <button type="button" class="button" disabled={!room} onClick={() => add("alternative added", undefined)}>
          Add an alternative
        </button>
        <button
          type="button"
          class="button"
          disabled={!room}
          onClick={() => add(`alternative ${letter} copied`, selected.key)}
        >
          Copy {letter}
        </button>
        <button type="button" class="button" disabled={document.alternatives.length === 1} onClick={remove}>
          {selected.regimenId === undefined ? "Remove" : "Retire"} {letter}
        </button>
        {!room && <span class="soft">{counts.alternatives} alternatives are as many as a case holds.</span>}
      </div>
      {failure.value && <FailureNote failure={failure.value} />}
      <RetiredList page={page} />
    </section>
  );
}

function sayState(page: CasePage, alternative: Alternative): string {
  const state = savedStateOf(page, alternative);
  if (state === "never") return "not saved yet";
  return state === "saved"
    ? `saved as revision ${alternative.savedNumber}`
    : `changed since revision ${alternative.savedNumber}`;
}
