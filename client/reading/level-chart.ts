import {
  Chart,
  type ChartDataset,
  LinearScale,
  LineController,
  LineElement,
  LogarithmicScale,
  type Plugin,
  PointElement,
} from "chart.js";
import { formatLevel, formatQuantity } from "../../shared/units/format.ts";
import { type CurvePicture, levelBounds, type PictureLine } from "./curve-picture.ts";
import { lettersApart } from "./letters-apart.ts";
import { gutters } from "./plot-scale.ts";

Chart.register(LineController, LineElement, LinearScale, LogarithmicScale, PointElement);

/** The one place that knows the chart library. */
export interface LevelChart {
  draw(picture: CurvePicture): void;
  destroy(): void;
}

const dark = "(prefers-color-scheme: dark)";

/** One chart for the life of a canvas: a new picture updates it, since chart objects made anew leak. */
export function createLevelChart(canvas: HTMLCanvasElement): LevelChart {
  let picture: CurvePicture | undefined;
  let inks = readInks(canvas);
  let drawnAxes = "";
  let drawnLines: readonly PictureLine[] = [];
  const chart = new Chart<"line">(canvas, {
    type: "line",
    data: { datasets: [] },
    plugins: [
      groundPlugin(
        () => picture,
        () => inks,
      ),
      marksPlugin(
        () => picture,
        () => inks,
      ),
    ],
    options: {
      animation: false,
      responsive: true,
      maintainAspectRatio: false,
      parsing: false,
      normalized: true,
      // The page has its own cursor, which works from the keyboard too.
      events: [],
      layout: { padding: { left: 0, right: gutters.rightPx, top: 10, bottom: 4 } },
      elements: { point: { radius: 0 }, line: { tension: 0 } },
      scales: { x: { type: "linear", display: false }, y: { type: "linear" } },
    },
  });
  const draw = () => {
    if (picture === undefined) return;
    const axes = axesKey(picture, inks);
    const before = drawnLines;
    drawnLines = picture.lines;
    if (axes === drawnAxes && before.length === picture.lines.length) {
      redrawLines(chart, before, picture.lines, inks);
      return;
    }
    chart.data.datasets = picture.lines.map((line, index) => inkedLine(chart.data.datasets[index], line, inks));
    // Options that are handed over are resolved anew, so they are handed over only when they differ.
    if (axes !== drawnAxes) chart.options.scales = scalesOf(picture, inks);
    drawnAxes = axes;
    chart.update("none");
  };
  const scheme = matchMedia(dark);
  const recolour = () => {
    inks = readInks(canvas);
    draw();
  };
  scheme.addEventListener("change", recolour);
  // A print is laid out in one go: what the chart would follow a frame later comes too late for it.
  const redraw = () => {
    chart.resize();
    recolour();
  };
  const toPaper = () => {
    document.documentElement.classList.add("on-paper");
    redraw();
  };
  const toScreen = () => {
    document.documentElement.classList.remove("on-paper");
    redraw();
  };
  addEventListener("beforeprint", toPaper);
  addEventListener("afterprint", toScreen);
  return {
    draw(next) {
      picture = next;
      draw();
    },
    destroy() {
      scheme.removeEventListener("change", recolour);
      removeEventListener("beforeprint", toPaper);
      removeEventListener("afterprint", toScreen);
      chart.destroy();
    },
  };
}

interface Inks {
  readonly of: (token: string) => string;
  readonly font: string;
}

/** Tokens resolved once a scheme, not once a frame: asking for a computed style makes the browser lay out. */
function readInks(canvas: HTMLCanvasElement): Inks {
  const styles = getComputedStyle(canvas);
  const known = new Map<string, string>();
  const of = (token: string) => {
    const found = known.get(token) ?? styles.getPropertyValue(token).trim();
    known.set(token, found);
    return found;
  };
  return { of, font: of("--plain") };
}

/** The same dataset object with new contents: for another object the library would build its parts anew. */
function inkedLine(
  dataset: ChartDataset<"line"> | undefined,
  { points, colour, dash, widthPx }: PictureLine,
  inks: Inks,
): ChartDataset<"line"> {
  return Object.assign(dataset ?? { data: [] }, {
    data: points as { x: number; y: number }[],
    borderColor: inks.of(colour),
    borderDash: [...dash],
    borderWidth: widthPx,
    borderJoinStyle: "bevel" as const,
    pointRadius: 0,
    fill: false,
  });
}

/** Only the lines that differ, in the axes that are there: an update of everything costs half a frame. */
function redrawLines(
  chart: Chart<"line">,
  before: readonly PictureLine[],
  lines: readonly PictureLine[],
  inks: Inks,
): void {
  lines.forEach((line, index) => {
    const alike = sameLook(before[index]!, line);
    if (alike && before[index]!.points === line.points) return;
    inkedLine(chart.data.datasets[index], line, inks);
    const { controller } = chart.getDatasetMeta(index);
    if (!alike) controller.configure();
    controller.buildOrUpdateElements();
    controller.update("none");
  });
  chart.render();
}

function sameLook(one: PictureLine, other: PictureLine): boolean {
  return one.colour === other.colour && one.widthPx === other.widthPx && one.dash.join() === other.dash.join();
}

function axesKey(picture: CurvePicture, inks: Inks): string {
  const { low, high } = levelBounds(picture);
  const { fromH, toH } = picture.window;
  return [picture.scale, low, high, fromH, toH, inks.of("--ink")].join(" ");
}

function scalesOf(picture: CurvePicture, inks: Inks) {
  const { window, scale } = picture;
  const { low, high } = levelBounds(picture);
  const log = scale === "logarithmic";
  return {
    x: { type: "linear" as const, display: false, min: window.fromH, max: window.toH },
    y: {
      type: scale,
      min: low,
      ...(log ? { max: high } : { suggestedMax: high }),
      afterFit: (axis: { width: number }) => {
        axis.width = gutters.leftPx;
      },
      border: { color: inks.of("--edge") },
      grid: { color: inks.of("--hairline"), drawTicks: false },
      ticks: {
        color: inks.of("--ink-soft"),
        font: { family: inks.font, size: 12 },
        padding: 6,
        maxTicksLimit: log ? 12 : 8,
        callback: (value: string | number) => (log && !isRound(Number(value)) ? "" : formatQuantity(Number(value), "")),
      },
    },
  };
}

/** 1, 2 and 5 times a power of ten: the labels of a logarithmic axis. */
function isRound(value: number): boolean {
  const leading = Number(value.toExponential(3).split("e")[0]);
  return leading === 1 || leading === 2 || leading === 5;
}

/** Behind the curves: clock lines, the desired range and the names of its edges. */
function groundPlugin(pictureNow: () => CurvePicture | undefined, inksNow: () => Inks): Plugin<"line"> {
  return {
    id: "ground",
    beforeDatasetsDraw({ ctx, chartArea, scales }) {
      const picture = pictureNow();
      const inks = inksNow();
      if (picture === undefined) return;
      const { left, right, top, bottom } = chartArea;
      ctx.save();
      ctx.lineWidth = 1;
      ctx.strokeStyle = inks.of("--hairline");
      ctx.beginPath();
      for (const atH of picture.gridH) {
        const x = Math.round(scales["x"]!.getPixelForValue(atH)) + 0.5;
        ctx.moveTo(x, top);
        ctx.lineTo(x, bottom);
      }
      ctx.stroke();
      if (picture.range !== undefined) {
        const pixel = (mgPerL: number) => Math.min(bottom, Math.max(top, scales["y"]!.getPixelForValue(mgPerL)));
        const highPx = pixel(picture.range.high);
        const lowPx = pixel(picture.range.low);
        ctx.fillStyle = inks.of("--range-band");
        ctx.fillRect(left, highPx, right - left, lowPx - highPx);
        ctx.strokeStyle = inks.of("--range-edge");
        ctx.setLineDash([1, 2]);
        for (const y of [highPx, lowPx]) {
          ctx.beginPath();
          ctx.moveTo(left, Math.round(y) + 0.5);
          ctx.lineTo(right, Math.round(y) + 0.5);
          ctx.stroke();
        }
      }
      ctx.restore();
    },
  };
}

/** Before the curves: peaks and troughs, the edges of the range in words, the letters. */
function marksPlugin(pictureNow: () => CurvePicture | undefined, inksNow: () => Inks): Plugin<"line"> {
  return {
    id: "marks",
    afterDatasetsDraw({ ctx, chartArea, scales }) {
      const picture = pictureNow();
      const inks = inksNow();
      if (picture === undefined) return;
      const xOf = (atH: number) => scales["x"]!.getPixelForValue(atH);
      const yOf = (mgPerL: number) =>
        Math.min(chartArea.bottom, Math.max(chartArea.top, scales["y"]!.getPixelForValue(mgPerL)));
      const write = (text: string, x: number, y: number, ink: string, align: CanvasTextAlign) => {
        ctx.textAlign = align;
        ctx.strokeStyle = inks.of("--raised");
        ctx.lineWidth = 4;
        ctx.lineJoin = "round";
        ctx.strokeText(text, x, y);
        ctx.fillStyle = ink;
        ctx.fillText(text, x, y);
      };
      ctx.save();
      ctx.font = `12px ${inks.font}`;
      ctx.textBaseline = "alphabetic";
      if (picture.range !== undefined) {
        const { low, high } = picture.range;
        write(`high end ${formatLevel(high)}`, chartArea.left + 6, yOf(high) - 4, inks.of("--ink-soft"), "left");
        write(`low end ${formatLevel(low)}`, chartArea.left + 6, yOf(low) + 14, inks.of("--ink-soft"), "left");
      }
      for (const mark of picture.marks) {
        const x = xOf(mark.x);
        const y = yOf(mark.y);
        const up = mark.kind === "peak" ? -1 : 1;
        ctx.fillStyle = inks.of(mark.colour);
        ctx.beginPath();
        ctx.moveTo(x, y + 3 * up);
        ctx.lineTo(x - 4, y + 9 * up);
        ctx.lineTo(x + 4, y + 9 * up);
        ctx.fill();
        if (mark.text === undefined) continue;
        const halfPx = ctx.measureText(mark.text).width / 2;
        const insideX = Math.min(chartArea.right - halfPx, Math.max(chartArea.left + halfPx, x));
        write(
          mark.text,
          insideX,
          mark.kind === "peak" ? Math.max(chartArea.top + 4, y - 13) : Math.min(chartArea.bottom - 2, y + 22),
          inks.of("--ink"),
          "center",
        );
      }
      ctx.font = `bold 13px ${inks.font}`;
      ctx.textBaseline = "middle";
      for (const { letter, y, colour } of lettersApart(picture, yOf, chartArea.top))
        write(letter, chartArea.right + 6, y, inks.of(colour), "left");
      ctx.restore();
    },
  };
}
