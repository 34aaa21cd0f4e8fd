import { bodyPt, type Face, face, ink, marginPt, needRoom, type Paper, printable, roomPt } from "./paper.ts";

/** A section heading with a rule above it. */
export function heading(paper: Paper, text: string): void {
  const { doc, root } = paper;
  needRoom(paper, 90);
  doc.moveDown(0.9);
  root.add(
    doc.struct("H2", {}, () => {
      doc
        .font(face.bold)
        .fontSize(11.5)
        .fillColor(ink.accent)
        .text(`${text} `, marginPt, doc.y, { width: paper.widthPt });
    }),
  );
  doc.moveDown(0.25);
  body(doc);
}

/** A paragraph. */
export function paragraph(
  paper: Paper,
  text: string,
  look: { readonly font?: Face; readonly sizePt?: number; readonly indentPt?: number } = {},
): void {
  const { doc, root } = paper;
  const indentPt = look.indentPt ?? 0;
  root.add(
    doc.struct("P", {}, () => {
      doc
        .font(face[look.font ?? "plain"])
        .fontSize(look.sizePt ?? bodyPt)
        .fillColor(ink.text)
        .text(`${printable(paper, text)} `, marginPt + indentPt, doc.y, {
          width: paper.widthPt - indentPt,
          lineGap: 1.5,
        });
    }),
  );
  body(doc);
}

/** A framed paragraph that nobody overlooks: a bar at its left edge. */
export function barred(paper: Paper, text: string, font: Face = "plain"): void {
  const { doc } = paper;
  doc.font(face[font]).fontSize(bodyPt);
  needRoom(paper, doc.heightOfString(text, { width: paper.widthPt - 12, lineGap: 1.5 }) + 8);
  const top = doc.y;
  paragraph(paper, text, { font, indentPt: 12 });
  artifact(doc, () => {
    doc
      .lineWidth(2.5)
      .strokeColor(ink.accent)
      .moveTo(marginPt + 3, top)
      .lineTo(marginPt + 3, doc.y - 2)
      .stroke();
  });
  doc.moveDown(0.35);
}

export interface Column {
  readonly title: string;
  /** Share of the width. */
  readonly share: number;
  readonly font?: Face;
}

/**
 * A table whose heading is repeated on every page it reaches. Rows never break across pages.
 *
 * @param rows one text per column
 */
export function table(
  paper: Paper,
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
  sizePt = 8.2,
  rowHeightPt = 0,
): void {
  const { doc } = paper;
  doc.fontSize(sizePt);
  const total = columns.reduce((sum, { share }) => sum + share, 0);
  const widths = columns.map(({ share }) => (share / total) * paper.widthPt);
  const heights = rows.map((row) => Math.max(rowHeightPt, rowHeight(paper, row, widths, columns, sizePt)));
  const headPt = rowHeight(
    paper,
    columns.map(({ title }) => title),
    widths,
    columns.map((column) => ({ ...column, font: "bold" as const })),
    sizePt,
  );
  let begin = 0;
  while (begin < rows.length) {
    if (roomPt(paper) < headPt + heights[begin]! + 2) doc.addPage();
    let room = roomPt(paper) - headPt - 2;
    let end = begin;
    while (end < rows.length && (heights[end]! <= room || end === begin)) room -= heights[end++]!;
    tablePart(paper, columns, widths, rows.slice(begin, end), sizePt, rowHeightPt);
    begin = end;
  }
  doc.x = marginPt;
  doc.moveDown(0.4);
  body(doc);
}

const paddingPt = 2.6;

function tablePart(
  paper: Paper,
  columns: readonly Column[],
  widths: readonly number[],
  rows: readonly (readonly string[])[],
  sizePt: number,
  rowHeightPt: number,
): void {
  const { doc, root } = paper;
  const section = doc.struct("Sect");
  root.add(section);
  const head = columns.map(({ title }) => ({
    type: "TH" as const,
    scope: "Column" as const,
    text: `${title} `,
    font: { src: face.bold, size: sizePt },
    backgroundColor: "#eef1ef",
  }));
  const cells = rows.map((row) =>
    row.map((text, index) => ({
      text: `${printable(paper, text)} `,
      font: { src: face[columns[index]!.font ?? "plain"], size: sizePt },
    })),
  );
  doc.fontSize(sizePt).fillColor(ink.text);
  const options = {
    structParent: section,
    position: { x: marginPt, y: doc.y },
    columnStyles: [...widths],
    ...(rowHeightPt > 0 && { rowStyles: (row: number) => (row === 0 ? {} : { minHeight: rowHeightPt }) }),
    defaultStyle: { padding: paddingPt, border: 0.4, borderColor: ink.line, textColor: ink.text },
    data: [head, ...cells],
  };
  doc.table(options);
  section.end();
}

/** What pdfkit will make of a row, so that a page is never begun in the middle of one. */
function rowHeight(
  paper: Paper,
  row: readonly string[],
  widths: readonly number[],
  columns: readonly Column[],
  sizePt: number,
): number {
  const { doc } = paper;
  const heights = row.map((text, index) => {
    doc.font(face[columns[index]!.font ?? "plain"]).fontSize(sizePt);
    return doc.heightOfString(`${printable(paper, text)} `, { width: widths[index]! - 2 * paddingPt });
  });
  return Math.max(...heights) + 2 * paddingPt + 0.5;
}

/** Something drawn that is no content: rules, frames, page numbers. */
export function artifact(doc: PDFKit.PDFDocument, draw: () => void): void {
  doc.markContent("Artifact", { type: "Layout" });
  draw();
  doc.endMarkedContent();
}

function body(doc: PDFKit.PDFDocument): void {
  doc.font(face.plain).fontSize(bodyPt).fillColor(ink.text);
}
