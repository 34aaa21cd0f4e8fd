import type { CasePage } from "../case/case-page.ts";

/** One field of the page that the server's problems can be about. */
export interface FieldPlace {
  /** Id of the element. */
  readonly id: string;
  readonly label: string;
}

const setting = "(?:/content)?/setting";

/** From the pointer of what was sent to the field that holds it; the first pattern that fits. */
const places: readonly (readonly [pattern: RegExp, place: FieldPlace | ((name: string) => FieldPlace)])[] = [
  [/^#\/label$|^#\/content\/caseLabel$/, { id: "case-label", label: "Label" }],
  [/^#\/timeZone$|^#\/content\/timeZone$/, { id: "case-zone", label: "Time zone" }],
  [/^#\/notes$/, { id: "case-notes", label: "Notes" }],
  [/^#\/content\/regimenLabel$/, { id: "alternative-label", label: "Name of the alternative" }],
  [new RegExp(`^#${setting}/kinetics/(\\w+)`), (name) => ({ id: `setting-${name}`, label: "Kinetics" })],
  [new RegExp(`^#${setting}/plan/(start|horizonH)`), (name) => ({ id: `setting-${name}`, label: "The plan" })],
  [new RegExp(`^#${setting}/startConcentration`), { id: "setting-startConcentration", label: "Start concentration" }],
  [new RegExp(`^#${setting}/rangeMgPerL/high`), { id: "setting-rangeHigh", label: "Desired range, high end" }],
  [new RegExp(`^#${setting}/rangeMgPerL`), { id: "setting-rangeLow", label: "Desired range, low end" }],
  [new RegExp(`^#${setting}/eliminationChanges`), { id: "changes-title", label: "Changing elimination" }],
  [/^#\/content\/schedule\/orders\/(\d+)/, (index) => ({ id: `order-${index}`, label: `Order ${Number(index) + 1}` })],
  [/^#\/content\/schedule/, { id: "doses-title", label: "Doses" }],
  [/^#\/content\/cautionReasons/, { id: "stops-title", label: "Reasons for going on" }],
  [/^#\/reason$/, { id: "save-reason", label: "Reason" }],
  [/^#\/preparedBy$/, { id: "save-preparedBy", label: "Prepared by" }],
];

/** The field that a problem's pointer is about; undefined where the page has none for it. */
export function fieldOfPointer(pointer: string): FieldPlace | undefined {
  for (const [pattern, place] of places) {
    const found = pattern.exec(pointer);
    if (found !== null) return typeof place === "function" ? place(found[1] ?? "") : place;
  }
  return undefined;
}

/** What the server did not accept about one field, for the place beside it. */
export function refusedAt(page: CasePage, id: string): string | undefined {
  const found = page.refused.value.find(({ pointer }) => fieldOfPointer(pointer)?.id === id);
  return found && `the server says it ${found.detail}`;
}
