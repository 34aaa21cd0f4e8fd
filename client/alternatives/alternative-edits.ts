import { counts } from "../../shared/contract/limits.ts";
import type { Alternative, CaseDocument } from "../case/case-document.ts";
import { emptySchedule } from "../case/document-of-case.ts";

/** Whether one more alternative has a letter left. */
export function hasRoom(document: CaseDocument): boolean {
  return document.alternatives.length < counts.alternatives;
}

/** The document with an empty alternative at the end; unchanged where all letters are taken. */
export function withNewAlternative(document: CaseDocument, key: string): CaseDocument {
  const added: Alternative = {
    key,
    label: freeLabel(document, "Another plan"),
    schedule: emptySchedule,
    savedNumber: 0,
    cautionReasons: [],
  };
  return appended(document, added);
}

/**
 * The document with a copy of one alternative at the end. What was given happened whichever plan is
 * looked at, so the copy has it too; reasons for going on are given anew.
 */
export function withCopy(document: CaseDocument, key: string, copyKey: string): CaseDocument {
  const source = document.alternatives.find((each) => each.key === key);
  if (source === undefined) return document;
  const label = freeLabel(document, `Copy of ${source.label}`.slice(0, counts.labelCharacters - 3));
  return appended(document, { key: copyKey, label, schedule: source.schedule, savedNumber: 0, cautionReasons: [] });
}

/** The document without one alternative; the last one stays. */
export function withoutAlternative(document: CaseDocument, key: string): CaseDocument {
  const alternatives = document.alternatives.filter((each) => each.key !== key);
  return alternatives.length === 0 ? document : { ...document, alternatives };
}

/** The document with one alternative at the end; unchanged where all letters are taken. */
export function appended(document: CaseDocument, alternative: Alternative): CaseDocument {
  return hasRoom(document) ? { ...document, alternatives: [...document.alternatives, alternative] } : document;
}

function freeLabel({ alternatives }: CaseDocument, wanted: string): string {
  const taken = new Set(alternatives.map(({ label }) => label));
  if (!taken.has(wanted)) return wanted;
  let number = 2;
  while (taken.has(`${wanted} ${number}`)) number++;
  return `${wanted} ${number}`;
}
