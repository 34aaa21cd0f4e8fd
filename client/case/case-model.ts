import { computed, type ReadonlySignal, type Signal, signal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { CaseSetting } from "../../shared/contract/setting.ts";
import { type CaseDocument, contentOf } from "./case-document.ts";
import type { SettingForm } from "./setting-form.ts";

/** How many steps back undo remembers; a document is shared structure, so a step is small. */
const rememberedSteps = 200;

/** State and actions of one case page. Undo is a list of documents; nothing else is mutable. */
export interface CaseModel {
  readonly document: ReadonlySignal<CaseDocument>;
  /** Per alternative key, in the document's order. Empty while the setting has a field to mend. */
  readonly contents: ReadonlySignal<ReadonlyMap<string, RegimenContent>>;
  readonly canUndo: ReadonlySignal<boolean>;
  readonly canRedo: ReadonlySignal<boolean>;
  /** What the newest change, undo or redo did, for the live region: "undone: amount of B". */
  readonly lastChange: ReadonlySignal<string>;
  /** The alternative being edited. */
  readonly selectedKey: Signal<string | undefined>;
  /** Elapsed hours from the plan's start at which levels are read out. */
  readonly cursorH: Signal<number>;
  /**
   * One undo step. Consecutive changes with the same `merge` text become one step, so that a drag or a
   * word being typed is undone as a whole; pass a fresh text for each drag.
   */
  change(what: string, edit: (document: CaseDocument) => CaseDocument, merge?: string): void;
  undo(): void;
  redo(): void;
  /** Writes a fact that is no work of the user (a saved number, a new id) into every remembered step. */
  rewrite(edit: (document: CaseDocument) => CaseDocument): void;
}

interface Step {
  readonly what: string;
  readonly document: CaseDocument;
}

interface History {
  readonly past: readonly Step[];
  readonly now: Step;
  readonly future: readonly Step[];
  readonly merge?: string;
  readonly said: string;
}

export type ReadSetting = (form: SettingForm, timeZone: string) => CaseSetting | undefined;

/**
 * @param opening     the case as the server has it, or unsaved work taken up again
 * @param readSetting what a form says; undefined where it cannot be read
 */
export function createCaseModel(opening: CaseDocument, readSetting: ReadSetting): CaseModel {
  const settled = settle(opening, readSetting);
  const history = signal<History>({ past: [], now: { what: "", document: settled }, future: [], said: "" });
  const document = computed(() => history.value.now.document);
  return {
    document,
    contents: contentsOf(document),
    canUndo: computed(() => history.value.past.length > 0),
    canRedo: computed(() => history.value.future.length > 0),
    lastChange: computed(() => history.value.said),
    selectedKey: signal(settled.alternatives[0]?.key),
    cursorH: signal(firstCursorH(settled)),
    change(what, edit, merge) {
      const before = history.peek();
      const edited = edit(before.now.document);
      if (edited === before.now.document) return;
      history.value = pushed(before, { what, document: resettle(before.now.document, edited, readSetting) }, merge);
    },
    undo() {
      history.value = undone(history.peek());
    },
    redo() {
      history.value = redone(history.peek());
    },
    rewrite(edit) {
      const { past, now, future, ...rest } = history.peek();
      const over = (step: Step): Step => ({
        ...step,
        document: resettle(step.document, edit(step.document), readSetting),
      });
      history.value = { ...rest, past: past.map(over), now: over(now), future: future.map(over) };
    },
  };
}

/** A day into the plan, or its middle: at hour 0 there is seldom anything to read. */
function firstCursorH({ setting }: CaseDocument): number {
  return setting === undefined ? 0 : Math.min(24, setting.plan.horizonH / 2);
}

function pushed(before: History, now: Step, merge: string | undefined): History {
  const joins = merge !== undefined && merge === before.merge && before.past.length > 0;
  const past = joins ? before.past : [...before.past, before.now].slice(-rememberedSteps);
  return { past, now, future: [], said: now.what, ...(merge !== undefined && { merge }) };
}

function undone(before: History): History {
  const last = before.past.at(-1);
  if (last === undefined) return before;
  const future = [before.now, ...before.future];
  return { past: before.past.slice(0, -1), now: last, future, said: `Undone: ${before.now.what}` };
}

function redone(before: History): History {
  const [next, ...future] = before.future;
  if (next === undefined) return before;
  return { past: [...before.past, before.now], now: next, future, said: `Done again: ${next.what}` };
}

function settle(document: CaseDocument, readSetting: ReadSetting): CaseDocument {
  return { ...document, setting: readSetting(document.form, document.timeZone) };
}

/** The setting keeps its identity while the form does, so that nothing is computed again for no reason. */
function resettle(before: CaseDocument, edited: CaseDocument, readSetting: ReadSetting): CaseDocument {
  const same = edited.form === before.form && edited.timeZone === before.timeZone;
  return same ? { ...edited, setting: before.setting } : settle(edited, readSetting);
}

/** A content keeps its identity while nothing in it changes: predictions are remembered by it. */
function contentsOf(document: ReadonlySignal<CaseDocument>): ReadonlySignal<ReadonlyMap<string, RegimenContent>> {
  let before: CaseDocument | undefined;
  let made: ReadonlyMap<string, RegimenContent> = new Map();
  return computed(() => {
    const now = document.value;
    const shared = before?.label === now.label && before.timeZone === now.timeZone && before.setting === now.setting;
    const known = new Map(before?.alternatives.map((alternative) => [alternative.key, alternative]));
    const next = new Map<string, RegimenContent>();
    for (const alternative of now.alternatives) {
      const kept = shared && known.get(alternative.key) === alternative ? made.get(alternative.key) : undefined;
      const content = kept ?? contentOf(now, alternative);
      if (content !== undefined) next.set(alternative.key, content);
    }
    before = now;
    made = next;
    return next;
  });
}
