import { type ReadonlySignal, signal } from "@preact/signals";
import type { MomentText } from "../controls/moment.ts";

/** What is typed in one editor that is open but not yet applied: texts by field name. */
export type Draft = Readonly<Record<string, string>>;

export type DraftsByName = Readonly<Record<string, Draft>>;

/** Every open editor of a page, kept with the unsaved work so that a reload loses none of it. */
export interface Drafts {
  readonly all: ReadonlySignal<DraftsByName>;
  open(name: string, draft: Draft): void;
  /** Sets some fields; opens the editor if it is not open. */
  set(name: string, fields: Draft): void;
  close(name: string): void;
}

export function createDrafts(opening: DraftsByName = {}): Drafts {
  const all = signal(opening);
  return {
    all,
    open(name, draft) {
      all.value = { ...all.peek(), [name]: draft };
    },
    set(name, fields) {
      all.value = { ...all.peek(), [name]: { ...all.peek()[name], ...fields } };
    },
    close(name) {
      const { [name]: _, ...rest } = all.peek();
      all.value = rest;
    },
  };
}

/** A field's text; empty where the draft has no such field. */
export function textIn(draft: Draft | undefined, field: string): string {
  return draft?.[field] ?? "";
}

/** A clock time takes two entries: what is typed and the instant it was read from, if any. */
export function momentIn(draft: Draft, field: string): MomentText {
  const instant = draft[`${field}.instant`];
  return { text: textIn(draft, field), ...(instant && { instant }) };
}

/** A clock time as entries of a draft; an empty instant is none. */
export function momentFields(field: string, { text, instant }: MomentText): Draft {
  return { [field]: text, [`${field}.instant`]: instant ?? "" };
}
