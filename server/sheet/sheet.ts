import type { Revision } from "../../shared/contract/case.ts";
import { prepare } from "../../shared/figures/prepared.ts";
import { givenDiffers } from "../../shared/schedule/course-of-content.ts";
import { writeArithmetic } from "./arithmetic.ts";
import { writeCautionList, writeFirstCaution } from "./cautions.ts";
import { writeChecking } from "./checking.ts";
import { writeCurve } from "./curve.ts";
import { writeDoses } from "./doses.ts";
import { writeFigures } from "./figures.ts";
import { writeFooters } from "./footers.ts";
import { writeIdentity } from "./identity.ts";
import { writeInputs } from "./inputs.ts";
import { closePaper, openPaper, type PaperSize } from "./paper.ts";
import { writeSecondOpinion } from "./second-opinion.ts";

/**
 * The sheet of one revision: everything a second person needs to check it by hand, from paper alone.
 * The same revision and paper always give the same bytes.
 *
 * @returns a tagged PDF with title, language and an embedded font
 * @throws {DomainError} if the revision's content cannot be computed
 */
export function writeSheet(revision: Revision, { paper: size }: { readonly paper: PaperSize }): Promise<Uint8Array> {
  const { content } = revision;
  const given = prepare(content, "given");
  const planned = givenDiffers(content) ? prepare(content, "planned") : undefined;
  const paper = openPaper(size, `Ebbline dosing plan, revision ${revision.number}`, new Date(revision.createdAt));
  writeFirstCaution(paper);
  writeIdentity(paper, revision);
  writeCautionList(paper, content);
  writeInputs(paper, given);
  writeDoses(paper, given);
  writeCurve(paper, given, planned);
  writeFigures(paper, given);
  writeArithmetic(paper, given);
  writeSecondOpinion(paper, revision);
  writeChecking(paper, revision, given.settled);
  writeFooters(paper, revision);
  return closePaper(paper);
}
