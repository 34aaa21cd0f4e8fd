import { cautionsForContent } from "../../shared/cautions/gather.ts";
import { standingCaution } from "../../shared/cautions/standing.ts";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { Caution } from "../../shared/contract/caution.ts";
import type { Paper } from "./paper.ts";
import { barred, heading, paragraph } from "./writing.ts";

const severityWords = { stop: "Stop", warn: "Warning", note: "Note" } as const;

/** What must be read before anything else. */
export function writeFirstCaution(paper: Paper): void {
  barred(paper, `Caution. ${standingCaution.text}`, "bold");
}

/** Every caution that applies, gravest first, with the reason given for going on. */
export function writeCautionList(paper: Paper, content: RegimenContent): void {
  const cautions = cautionsForContent(content).filter(({ code }) => code !== standingCaution.code);
  heading(paper, "Cautions that apply");
  if (cautions.length === 0) paragraph(paper, "No caution applies besides the one at the top of this sheet.");
  for (const caution of cautions)
    paragraph(paper, `${severityWords[caution.severity]}: ${caution.text}${answerTo(caution, content)}`);
}

function answerTo(caution: Caution, { cautionReasons }: RegimenContent): string {
  const answer = cautionReasons.find(
    ({ code, about, text }) => code === caution.code && about === caution.about && text === caution.text,
  );
  return answer === undefined ? "" : ` Reason given: ${answer.reason}`;
}
