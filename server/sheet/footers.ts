import type { Revision } from "../../shared/contract/case.ts";
import { face, ink, marginPt, type Paper, printable } from "./paper.ts";

/** Case, revision, hash and "page x of y" at the foot of every page, so that no page goes astray. */
export function writeFooters(paper: Paper, { content, number, contentHash }: Revision): void {
  const { doc, widthPt } = paper;
  const { start, count } = doc.bufferedPageRange();
  for (let index = 0; index < count; index++) {
    doc.switchToPage(start + index);
    const y = doc.page.height - marginPt;
    doc.markContent("Artifact", { type: "Pagination" });
    doc.font(face.plain).fontSize(7.2).fillColor(ink.soft);
    const label = printable(paper, content.caseLabel);
    const left = `${label.length > 60 ? `${label.slice(0, 59)}…` : label}, revision ${number}, hash ${contentHash.slice(0, 12)}`;
    // The foot lies within the bottom margin, where a line that may wrap would begin a new page.
    doc.text(`${left} `, marginPt, y, { lineBreak: false });
    const right = `Page ${index + 1} of ${count} `;
    doc.text(right, marginPt + widthPt - doc.widthOfString(right), y, { lineBreak: false });
    doc.endMarkedContent();
  }
}
