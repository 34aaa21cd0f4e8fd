import { computed, type ReadonlySignal, type Signal, signal } from "@preact/signals";
import { cautionsForContent } from "../../shared/cautions/gather.ts";
import { standingCaution } from "../../shared/cautions/standing.ts";
import type { WholeCase } from "../../shared/contract/answers.ts";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { Caution } from "../../shared/contract/caution.ts";
import { DomainError } from "../../shared/errors.ts";
import { type Alternative, type CaseDocument, contentOf } from "./case-document.ts";
import { type CaseModel, createCaseModel } from "./case-model.ts";
import { documentOfCase } from "./document-of-case.ts";
import { createDrafts, type Drafts, type DraftsByName } from "./drafts.ts";
import { liveDrafts } from "./live-drafts.ts";
import { readSetting, readSettingForm, type SettingReading } from "./read-setting.ts";
import { same } from "./same.ts";
import { sayAllowed } from "./say-refusal.ts";
import type { SettingForm } from "./setting-form.ts";
import { settling } from "./settling.ts";

/** Cautions of one alternative, or why it cannot be computed. */
export interface Judged {
  readonly cautions: readonly Caution[];
  /** Path within the content and what is wrong there. */
  readonly problem?: { readonly field: string; readonly detail: string };
}

export type SavedState = "never" | "saved" | "changed";

/** Everything one case page knows: what is typed, what the server has, and what follows from both. */
export interface CasePage {
  readonly model: CaseModel;
  readonly drafts: Drafts;
  /** What the server last told about the case. */
  readonly stored: Signal<WholeCase>;
  /** Version of the case that the details on the page started from. */
  readonly baseVersion: Signal<number>;
  /** What the server did not accept, by JSON Pointer of what was sent. */
  readonly refused: Signal<readonly { readonly pointer: string; readonly detail: string }[]>;
  readonly form: ReadonlySignal<SettingForm>;
  readonly timeZone: ReadonlySignal<string>;
  readonly reading: ReadonlySignal<SettingReading>;
  /** The document once it rests: what is long to draw follows this one. */
  readonly settled: ReadonlySignal<CaseDocument>;
  /** The alternative being edited, as the settled document has it. */
  readonly selected: ReadonlySignal<Alternative | undefined>;
  readonly selectedContent: ReadonlySignal<RegimenContent | undefined>;
  readonly judged: ReadonlySignal<Judged>;
  /** Label, notes, time zone or setting differ from what the server has. */
  readonly detailsChanged: ReadonlySignal<boolean>;
  readonly unsaved: ReadonlySignal<boolean>;
  /** Ends what runs on its own; the page is not shown any more. */
  close(): void;
}

/** What an earlier visit left unsaved. */
export interface UnsavedWork {
  readonly document: CaseDocument;
  readonly drafts: DraftsByName;
  readonly baseVersion: number;
}

/** @param unsaved work taken up again; without it the page opens as the server has the case */
export function createCasePage(whole: WholeCase, unsaved?: UnsavedWork): CasePage {
  const model = createCaseModel(unsaved?.document ?? documentOfCase(whole), readSetting);
  const drafts = createDrafts(unsaved?.drafts);
  const stored = signal(whole);
  const opened = computed(() => documentOfCase(stored.value));
  const { value: settled, stop } = settling(model.document);
  const selected = computed(() => selectedIn(settled.value, model.selectedKey.value));
  const selectedContent = computed(() => selected.value && contentOf(settled.value, selected.value));
  const form = computed(() => model.document.value.form);
  const timeZone = computed(() => model.document.value.timeZone);
  const detailsChanged = computed(() => !sameDetails(settled.value, opened.value));
  return {
    model,
    drafts,
    stored,
    baseVersion: signal(unsaved?.baseVersion ?? whole.case.version),
    refused: signal([]),
    form,
    timeZone,
    settled,
    reading: computed(() => readSettingForm(form.value, timeZone.value)),
    selected,
    selectedContent,
    judged: computed(() => judge(selectedContent.value)),
    detailsChanged,
    unsaved: computed(() => differs(settled.value, opened.value, drafts.all.value)),
    close: stop,
  };
}

/** Whether anything on the page is not on the server, this very moment. */
export function hasUnsaved({ model, stored, drafts }: CasePage): boolean {
  return differs(model.document.peek(), documentOfCase(stored.peek()), drafts.all.peek());
}

/** Whether label, notes, time zone or setting differ from what the server has, this very moment. */
export function haveDetailsChanged({ model, stored }: CasePage): boolean {
  return !sameDetails(model.document.peek(), documentOfCase(stored.peek()));
}

/** How an alternative on the page stands to its newest revision. */
export function savedStateOf(page: CasePage, alternative: Alternative): SavedState {
  const latest = page.stored.value.regimens.find(({ id }) => id === alternative.regimenId)?.latest;
  if (latest === undefined) return "never";
  return same(contentOf(page.settled.value, alternative), latest.content) ? "saved" : "changed";
}

/** Cautions of a content; where it cannot be computed, the standing one and the reason. */
export function judge(content: RegimenContent | undefined): Judged {
  if (content === undefined) return { cautions: [standingCaution] };
  try {
    return { cautions: cautionsForContent(content) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return {
      cautions: [standingCaution],
      problem: { field: error.field, detail: sayAllowed(error, content.timeZone) },
    };
  }
}

function selectedIn({ alternatives }: CaseDocument, key: string | undefined): Alternative | undefined {
  return alternatives.find((each) => each.key === key) ?? alternatives[0];
}

function differs(now: CaseDocument, opened: CaseDocument, drafts: DraftsByName): boolean {
  return (
    Object.keys(liveDrafts(drafts, now)).length > 0 || !sameDetails(now, opened) || !same(unkeyed(now), unkeyed(opened))
  );
}

/** A new alternative keeps its key on the page when the server gives it an id. */
function unkeyed({ alternatives }: CaseDocument): Omit<Alternative, "key">[] {
  return alternatives.map(({ key: _, ...rest }) => rest);
}

/** The form is compared by what it says once it says something; until then by its texts. */
function sameDetails(now: CaseDocument, opened: CaseDocument): boolean {
  if (now.label !== opened.label || now.notes !== opened.notes || now.timeZone !== opened.timeZone) return false;
  return now.setting === undefined || opened.setting === undefined
    ? same(now.form, opened.form)
    : same(now.setting, opened.setting);
}
