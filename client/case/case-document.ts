import type { CautionReason, RegimenContent, RegimenId, Schedule } from "../../shared/contract/case.ts";
import type { CaseSetting } from "../../shared/contract/setting.ts";
import type { SettingForm } from "./setting-form.ts";

/** One alternative as it stands on the page, saved or not. */
export interface Alternative {
  readonly key: string;
  /** Absent until the server has the alternative. */
  readonly regimenId?: RegimenId;
  readonly label: string;
  readonly schedule: Schedule;
  /** Number of the newest revision this work started from; 0 for none. */
  readonly savedNumber: number;
  readonly cautionReasons: readonly CautionReason[];
}

/**
 * Everything about one case that a person can change on its page. `setting` is what `form` says once
 * every field in it is valid, and undefined until then: edit `form`, never `setting`.
 */
export interface CaseDocument {
  readonly label: string;
  readonly timeZone: string;
  readonly notes: string;
  readonly form: SettingForm;
  readonly setting: CaseSetting | undefined;
  readonly alternatives: readonly Alternative[];
}

/** The document with one alternative replaced; the same document if no alternative has the key. */
export function withAlternative(
  document: CaseDocument,
  key: string,
  edit: (alternative: Alternative) => Alternative,
): CaseDocument {
  if (!document.alternatives.some((alternative) => alternative.key === key)) return document;
  const alternatives = document.alternatives.map((each) => (each.key === key ? edit(each) : each));
  return { ...document, alternatives };
}

/** The document with one alternative's schedule replaced. */
export function withSchedule(
  document: CaseDocument,
  key: string,
  edit: (schedule: Schedule) => Schedule,
): CaseDocument {
  return withAlternative(document, key, (each) => ({ ...each, schedule: edit(each.schedule) }));
}

/** All that is needed to compute one alternative; undefined while the setting has a field to mend. */
export function contentOf(document: CaseDocument, alternative: Alternative): RegimenContent | undefined {
  if (document.setting === undefined) return undefined;
  return {
    formatVersion: 1,
    caseLabel: document.label,
    regimenLabel: alternative.label,
    timeZone: document.timeZone,
    setting: document.setting,
    schedule: alternative.schedule,
    cautionReasons: [...alternative.cautionReasons],
  };
}

/** The letter an alternative goes by: A to F, by its place in the case. */
export function letterOf(document: CaseDocument, key: string): string {
  const index = document.alternatives.findIndex((alternative) => alternative.key === key);
  return index < 0 ? "?" : String.fromCharCode(65 + index);
}
