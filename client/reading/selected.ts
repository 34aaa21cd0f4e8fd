import type { CaseModel } from "../case/case-model.ts";

/** The alternative being edited; the first one where none is chosen. Undefined where there is none. */
export function selectedKeyOf({ document, selectedKey }: CaseModel): string | undefined {
  const { alternatives } = document.value;
  return (alternatives.find(({ key }) => key === selectedKey.value) ?? alternatives[0])?.key;
}
