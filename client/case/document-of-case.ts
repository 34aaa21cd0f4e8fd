import type { WholeCase } from "../../shared/contract/answers.ts";
import type { Alternative, CaseDocument } from "./case-document.ts";
import { formOfSetting } from "./form-of-setting.ts";

/** A case as its page opens: what the server has, without what was retired. */
export function documentOfCase({ case: stored, regimens }: WholeCase): CaseDocument {
  const current = regimens.filter(({ retired }) => !retired).map(alternativeOf);
  return {
    label: stored.label,
    timeZone: stored.timeZone,
    notes: stored.notes,
    form: formOfSetting(stored.setting, stored.timeZone),
    setting: stored.setting,
    alternatives: current.length > 0 ? current : [firstAlternative],
  };
}

/** One alternative as its newest revision has it; without orders where it was never saved. */
export function alternativeOf({ id, label, latest }: WholeCase["regimens"][number]): Alternative {
  return {
    key: id,
    regimenId: id,
    label,
    schedule: latest?.content.schedule ?? emptySchedule,
    savedNumber: latest?.number ?? 0,
    cautionReasons: latest?.content.cautionReasons ?? [],
  };
}

export const emptySchedule: Alternative["schedule"] = { orders: [], records: [], extras: [] };

/** A new case has one alternative to write in; its key is fixed, so that the untouched page is no unsaved work. */
const firstAlternative: Alternative = {
  key: "first",
  label: "First plan",
  schedule: emptySchedule,
  savedNumber: 0,
  cautionReasons: [],
};
