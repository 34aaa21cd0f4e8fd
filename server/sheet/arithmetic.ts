import type { ArithmeticSection, ArithmeticStep } from "../../shared/figures/arithmetic/step.ts";
import { workedArithmeticOf } from "../../shared/figures/arithmetic/worked-arithmetic.ts";
import type { Prepared } from "../../shared/figures/prepared.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import { type Face, face, ink, marginPt, needRoom, type Paper, printable } from "./paper.ts";
import { heading, paragraph } from "./writing.ts";

const howToCheck =
  "Each line can be redone with a hand calculator from the numbers printed in it. Results are rounded to six digits and carried on as printed; where the program has the figure with all its digits, it stands beside. A line agrees where your result is within 0.5 percent of it.";

/** The figures once more, line by line: formula, numbers put in, result. */
export function writeArithmetic(paper: Paper, prepared: Prepared): void {
  heading(paper, "Worked arithmetic");
  paragraph(paper, howToCheck);
  for (const section of workedArithmeticOf(prepared)) writeSection(paper, section);
}

function writeSection(paper: Paper, section: ArithmeticSection): void {
  const { doc, root } = paper;
  needRoom(paper, 70);
  doc.moveDown(0.5);
  root.add(
    doc.struct("H3", {}, () => {
      doc
        .font(face.bold)
        .fontSize(9.8)
        .fillColor(ink.text)
        .text(`${section.title} `, marginPt, doc.y, { width: paper.widthPt });
    }),
  );
  doc.moveDown(0.15);
  if (section.note !== undefined) paragraph(paper, section.note, { sizePt: 8.2 });
  for (const step of section.steps) writeStep(paper, step);
}

function writeStep(paper: Paper, step: ArithmeticStep): void {
  const { doc, root } = paper;
  const program = step.program === undefined ? "" : `   (program: ${formatQuantity(step.program, step.unit, 8)})`;
  const lines: { text: string; font: Face; indentPt: number }[] = [
    { text: step.title, font: "bold", indentPt: 0 },
    { text: step.formula, font: "plain", indentPt: 12 },
    { text: `= ${step.substituted}`, font: "plain", indentPt: 12 },
    { text: `= ${step.result}${program}`, font: "bold", indentPt: 12 },
  ];
  doc.fontSize(8.2);
  const height = lines.reduce(
    (sum, { text, indentPt }) =>
      sum + doc.heightOfString(printable(paper, text), { width: paper.widthPt - indentPt }) + 1,
    4,
  );
  needRoom(paper, height);
  doc.moveDown(0.25);
  root.add(
    doc.struct(
      "P",
      {},
      lines.map(({ text, font, indentPt }) =>
        doc.struct("Span", {}, () => {
          doc
            .font(face[font])
            .fontSize(8.2)
            .fillColor(ink.text)
            .text(`${printable(paper, text)} `, marginPt + indentPt, doc.y, { width: paper.widthPt - indentPt });
        }),
      ),
    ),
  );
}
