/**
 * What pdfkit 0.20 has and its published types (0.17) do not know yet: structure of tables, the bounding box
 * of a figure, and the font in use, which tells whether a sign can be printed.
 */
declare namespace PDFKit {
  namespace Mixins {
    interface TableOptions {
      structParent?: PDFStructureElement;
    }
    interface CellOptions {
      scope?: "Column" | "Row";
    }
    interface StructureElementOptions {
      bbox?: [left: number, top: number, right: number, bottom: number];
    }
  }
  interface PDFDocument {
    readonly _font: { readonly font: { hasGlyphForCodePoint(code: number): boolean } };
  }
}
