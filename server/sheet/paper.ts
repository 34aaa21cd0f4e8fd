import { createRequire } from "node:module";
import PDFDocument from "pdfkit";

export type PaperSize = "A4" | "Letter";

const { resolve } = createRequire(import.meta.url);

/**
 * By file, not by a registered name: pdfkit's tables go back to a font by its file, and would open and
 * decode it anew for every cell.
 */
export const face = {
  plain: resolve("dejavu-fonts-ttf/ttf/DejaVuSans.ttf"),
  bold: resolve("dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf"),
} as const;

export type Face = keyof typeof face;

/** Points; a quarter of an inch more than most printers need. */
export const marginPt = 46;
export const bodyPt = 9;

export const ink = { text: "#1d2a33", soft: "#4c5963", line: "#8a9399", band: "#dfe9e4", accent: "#12584f" } as const;

/** One document being written: pdfkit's own, with its structure tree and where a section's parts belong. */
export interface Paper {
  readonly doc: PDFKit.PDFDocument;
  readonly root: PDFKit.PDFStructureElement;
  readonly widthPt: number;
}

/**
 * An empty tagged document. DejaVu is embedded because it has every sign used; a built-in font would
 * print other signs in place of those it lacks. The title holds nothing typed: pdfkit writes it into XML unescaped.
 *
 * @param createdAt from the record, so that one revision always gives the same bytes
 */
export function openPaper(size: PaperSize, title: string, createdAt: Date): Paper {
  const options = {
    size: size === "A4" ? "A4" : "LETTER",
    margins: { top: marginPt, bottom: marginPt + 8, left: marginPt, right: marginPt },
    pdfVersion: "1.7",
    subset: "PDF/UA",
    tagged: true,
    lang: "en-GB",
    displayTitle: true,
    bufferPages: true,
    info: { Title: title, Creator: "Ebbline", Producer: "Ebbline", CreationDate: createdAt },
  };
  // The type declarations of pdfkit do not know the PDF/UA subset yet.
  const doc = new PDFDocument(options as unknown as PDFKit.PDFDocumentOptions);
  doc.font(face.plain).fontSize(bodyPt).fillColor(ink.text);
  const root = doc.struct("Document");
  doc.addStructure(root);
  return { doc, root, widthPt: doc.page.width - 2 * marginPt };
}

/** Closes the document and gives its bytes. */
export function closePaper({ doc, root }: Paper): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  return new Promise((resolve, reject) => {
    doc.on("data", (chunk: Uint8Array) => chunks.push(chunk));
    doc.on("end", () => resolve(new Uint8Array(Buffer.concat(chunks))));
    doc.on("error", reject);
    root.end();
    doc.end();
  });
}

/** Space left above the bottom margin of this page. */
export function roomPt({ doc }: Paper): number {
  return doc.page.height - doc.page.margins.bottom - doc.y;
}

/** Goes on to a new page where less room than this is left, so that a heading keeps its first lines. */
export function needRoom(paper: Paper, heightPt: number): void {
  if (roomPt(paper) < heightPt) paper.doc.addPage();
}

/** Keeps its neighbours on one line and prints nothing. */
const wordJoiner = "\u2060";

/**
 * Text that the embedded font can print in full: a sign that it lacks is named by its code instead of
 * being shown as an empty box, and control characters become spaces. A unit stays on one line; else one
 * could end within mg/L.
 */
export function printable({ doc }: Paper, text: string): string {
  const { font } = doc._font;
  return [...text.replace(/(?<=mg|mg·h|L)\/(?=L|h)/g, `/${wordJoiner}`)]
    .map((sign) => {
      const code = sign.codePointAt(0)!;
      if (code < 0x20 || (code >= 0x7f && code < 0xa0)) return " ";
      return font.hasGlyphForCodePoint(code) ? sign : `[U+${code.toString(16).toUpperCase()}]`;
    })
    .join("");
}
