import type { Revision } from "../../shared/contract/case.ts";
import { secondOpinionTolerance } from "../../shared/kinetics/second-opinion.ts";
import { instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import type { Paper } from "./paper.ts";
import { heading, paragraph } from "./writing.ts";

/** How far the two roads of calculation lie apart. */
export function writeSecondOpinion(paper: Paper, { content, secondOpinion }: Revision): void {
  const { largestDifferenceMgPerL, largestLevelMgPerL, relative, atH, points } = secondOpinion;
  const at = sayClock(instantAt(content.setting.plan.start, atH, content.timeZone), content.timeZone);
  heading(paper, "Second opinion by another road of calculation");
  paragraph(
    paper,
    `The levels were calculated a second time by numerical convolution, which shares no code with the first. At ${points} times compared, the largest difference is ${formatQuantity(largestDifferenceMgPerL, "mg/L", 2)} (at ${at}), which is ${formatQuantity(relative, "", 2)} of the largest level of ${formatQuantity(largestLevelMgPerL, "mg/L")}. Up to ${formatQuantity(secondOpinionTolerance, "", 1)} of it is accepted. Both start from the same inputs: this finds faults of calculation, not of entry or of the model, and is no independent check.`,
  );
}
