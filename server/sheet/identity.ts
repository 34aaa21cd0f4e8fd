import type { Revision } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { face, ink, marginPt, type Paper } from "./paper.ts";
import { paragraph, table } from "./writing.ts";

const purpose =
  "This sheet states one planned regimen, the levels predicted for it and the arithmetic behind them, so that a second person can check it independently, by hand and without the program, before anybody acts on it.";

/** What the sheet is for and which revision of what it belongs to. */
export function writeIdentity(paper: Paper, revision: Revision): void {
  const { doc, root } = paper;
  doc.moveDown(0.6);
  root.add(
    doc.struct("H1", {}, () => {
      doc
        .font(face.bold)
        .fontSize(17)
        .fillColor(ink.text)
        .text("Dosing plan for an independent check ", marginPt, doc.y, { width: paper.widthPt });
    }),
  );
  doc.moveDown(0.3);
  paragraph(paper, purpose);
  doc.moveDown(0.4);
  const { content } = revision;
  table(
    paper,
    [
      { title: "This sheet", share: 2 },
      { title: "Entry", share: 6, font: "bold" },
    ],
    [
      ["Case", content.caseLabel],
      ["Alternative", content.regimenLabel],
      ["Revision", `${revision.number}`],
      ["Reason for it", revision.reason],
      ["Prepared by", revision.preparedBy],
      ["Saved at", `${sayClock(revision.createdAt, content.timeZone)} (${content.timeZone})`],
      ["Content hash", `${revision.contentHash.slice(0, 32)} ${revision.contentHash.slice(32)} (SHA-256)`],
    ],
  );
}
