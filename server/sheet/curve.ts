import { type CurvePoint, curvePoints } from "../../shared/figures/curve-points.ts";
import type { Prepared } from "../../shared/figures/prepared.ts";
import { exposureOf } from "../../shared/kinetics/exposure.ts";
import { instantAt, sayClock, sayTime } from "../../shared/schedule/clock.ts";
import { formatLevel, formatQuantity } from "../../shared/units/format.ts";
import { niceTicks, timeTicksH } from "./axis.ts";
import { face, ink, marginPt, needRoom, type Paper } from "./paper.ts";
import { heading, paragraph } from "./writing.ts";

/** Points of the curve a printer can tell apart, for each point of the page. */
const perPt = 3;
const heightPt = 210;
const leftPt = 44;
const footPt = 40;

interface Frame {
  readonly x: (atH: number) => number;
  readonly y: (mgPerL: number) => number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** The predicted level over the whole plan as a vector drawing, with the desired range and the doses. */
export function writeCurve(paper: Paper, given: Prepared, planned: Prepared | undefined): void {
  const { doc, root } = paper;
  needRoom(paper, heightPt + footPt + 70);
  heading(paper, "Predicted level");
  paragraph(paper, captionOf(given, planned));
  doc.moveDown(0.4);
  const top = doc.y;
  const bbox: [number, number, number, number] = [marginPt, top, marginPt + paper.widthPt, top + heightPt + footPt];
  const options = { alt: `${altOf(given)} `, bbox };
  root.add(doc.struct("Figure", options, () => draw(paper, given, planned, top)));
  doc.x = marginPt;
  doc.y = top + heightPt + footPt;
}

function draw(paper: Paper, given: Prepared, planned: Prepared | undefined, top: number): void {
  const { doc } = paper;
  const { horizonH } = given.course;
  const range = given.content.setting.rangeMgPerL;
  const curves = [given, ...(planned === undefined ? [] : [planned])].map(({ made }) =>
    curvePoints(made, { fromH: 0, toH: horizonH }, perPt * paper.widthPt),
  );
  const highest = Math.max(...curves.flatMap((points) => points.map(({ y }) => y)), range?.high ?? 0);
  const ticks = niceTicks(highest > 0 ? highest * 1.06 : 1);
  const left = marginPt + leftPt;
  const right = marginPt + paper.widthPt - 6;
  const bottom = top + heightPt;
  const frame: Frame = {
    left,
    right,
    top,
    bottom,
    x: (atH) => left + ((right - left) * atH) / horizonH,
    y: (mgPerL) => bottom - ((bottom - top) * mgPerL) / ticks.at(-1)!,
  };
  doc.save();
  if (range !== undefined) drawRange(doc, frame, range);
  drawLevels(doc, frame, ticks);
  drawTimes(doc, frame, given);
  doc.lineWidth(0.8).strokeColor(ink.text).moveTo(left, top).lineTo(left, bottom).lineTo(right, bottom).stroke();
  if (curves[1] !== undefined) drawCurve(doc, frame, curves[1], "dashed");
  drawCurve(doc, frame, curves[0]!, "full");
  drawDoses(doc, frame, given);
  doc.restore();
}

function drawRange(doc: PDFKit.PDFDocument, { left, right, y }: Frame, range: { low: number; high: number }): void {
  doc.rect(left, y(range.high), right - left, y(range.low) - y(range.high)).fill(ink.band);
  doc.lineWidth(0.5).strokeColor(ink.accent).dash(2, { space: 2 });
  for (const edge of [range.low, range.high]) doc.moveTo(left, y(edge)).lineTo(right, y(edge)).stroke();
  doc.undash();
}

function drawLevels(doc: PDFKit.PDFDocument, { left, y }: Frame, ticks: readonly number[]): void {
  doc.font(face.plain).fontSize(7.2);
  for (const tick of ticks) {
    doc
      .lineWidth(0.5)
      .strokeColor(ink.line)
      .moveTo(left - 3, y(tick))
      .lineTo(left, y(tick))
      .stroke();
    doc.fillColor(ink.text).text(`${formatQuantity(tick, "mg/L")} `, marginPt - 14, y(tick) - 4, {
      width: leftPt + 9,
      align: "right",
      lineBreak: false,
    });
  }
}

function drawTimes(doc: PDFKit.PDFDocument, { left, right, bottom, x }: Frame, { content, course }: Prepared): void {
  const { start } = content.setting.plan;
  doc.font(face.plain).fontSize(7.2);
  for (const atH of timeTicksH(course.horizonH, 8)) {
    const instant = instantAt(start, atH, content.timeZone);
    doc
      .lineWidth(0.5)
      .strokeColor(ink.line)
      .moveTo(x(atH), bottom)
      .lineTo(x(atH), bottom + 3)
      .stroke();
    const centre = Math.min(Math.max(x(atH), left + 12), right - 22);
    doc.fillColor(ink.text);
    doc.text(`${sayTime(instant, content.timeZone)} `, centre - 30, bottom + 12, {
      width: 60,
      align: "center",
      lineBreak: false,
    });
    doc.text(`${sayClock(instant, content.timeZone).split(" ").slice(1, 3).join(" ")} `, centre - 30, bottom + 21, {
      width: 60,
      align: "center",
      lineBreak: false,
    });
  }
}

function drawCurve(
  doc: PDFKit.PDFDocument,
  { x, y }: Frame,
  points: readonly CurvePoint[],
  line: "full" | "dashed",
): void {
  doc.lineWidth(line === "full" ? 1.3 : 0.9).strokeColor(line === "full" ? ink.text : ink.soft);
  if (line === "dashed") doc.dash(4, { space: 3 });
  points.forEach((point, index) => {
    if (index === 0) doc.moveTo(x(point.x), y(point.y));
    else doc.lineTo(x(point.x), y(point.y));
  });
  doc.stroke();
  if (line === "dashed") doc.undash();
}

/** A small wedge under the axis at each dose. */
function drawDoses(doc: PDFKit.PDFDocument, { x, bottom }: Frame, { doses, course }: Prepared): void {
  for (const { atH } of doses) {
    if (atH > course.horizonH) continue;
    doc.polygon([x(atH), bottom + 1.5], [x(atH) - 2.2, bottom + 7], [x(atH) + 2.2, bottom + 7]).fill(ink.text);
  }
}

function captionOf({ content }: Prepared, planned: Prepared | undefined): string {
  const range = content.setting.rangeMgPerL;
  const shaded =
    range === undefined
      ? ""
      : ` The shaded band is the desired range, ${formatLevel(range.low)} to ${formatLevel(range.high)}.`;
  const dashed =
    planned === undefined ? "" : " The dashed line is the plan as if everything had been given as planned.";
  return `Full line: predicted level in mg/L. Wedges under the axis: doses.${shaded}${dashed}`;
}

function altOf({ content, made, course }: Prepared): string {
  const { peak, trough } = exposureOf(made, { fromH: 0, toH: course.horizonH });
  const at = (atH: number) => sayClock(instantAt(content.setting.plan.start, atH, content.timeZone), content.timeZone);
  return `Curve of the predicted level over ${formatQuantity(course.horizonH, "h")}: highest ${formatLevel(peak.mgPerL)} at ${at(peak.atH)}, lowest ${formatLevel(trough.mgPerL)} at ${at(trough.atH)}. The figures are in the table that follows.`;
}
