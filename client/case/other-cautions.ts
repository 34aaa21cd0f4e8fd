import type { Caution } from "../../shared/contract/caution.ts";
import { type CaseDocument, contentOf, letterOf } from "./case-document.ts";
import { judge } from "./case-page.ts";

/**
 * The warnings of the alternatives that are not being edited, in one line: their curves and figures stand
 * on the same page. Notes are left out; most are shared.
 *
 * @returns undefined where there are none
 */
export function sayOtherCautions(document: CaseDocument, selectedKey: string | undefined): string | undefined {
  const said = document.alternatives.flatMap((alternative) => {
    if (alternative.key === selectedKey) return [];
    const { cautions, problem } = judge(contentOf(document, alternative));
    const counts = problem === undefined ? sayGrave(cautions) : "cannot be computed";
    return counts === undefined ? [] : [`${letterOf(document, alternative.key)}: ${counts}`];
  });
  return said.length === 0 ? undefined : `Not shown here, of the other alternatives: ${said.join("; ")}`;
}

function sayGrave(cautions: readonly Caution[]): string | undefined {
  const said = (["stop", "warn"] as const).flatMap((severity) => {
    const number = cautions.filter((caution) => caution.severity === severity).length;
    const word = severity === "stop" ? "stop" : "warning";
    return number === 0 ? [] : [`${number} ${word}${number === 1 ? "" : "s"}`];
  });
  return said.length === 0 ? undefined : said.join(", ");
}
