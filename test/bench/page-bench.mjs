import { gzipSync } from "node:zlib";
import { chromium } from "playwright-core";
import { findChromium } from "../e2e/find-chromium.mjs";
import { serverGroup } from "./started-server.mjs";
import { line, notMeasured, quantile } from "./timing.mjs";

const frameMs = 1_000 / 60;
const quiet =
  "--no-sandbox --disable-gpu --disable-quic --no-first-run --disable-background-networking --disable-component-update --disable-sync";

/** In a real Chromium: how soon the curve follows a moved dose, and how much JavaScript the first load takes. */
export async function pageBenchmarks() {
  const executablePath = findChromium();
  if (executablePath === undefined) return [notMeasured("the page in a browser", "no Chromium is there")];
  const servers = serverGroup();
  const browser = await chromium.launch({ executablePath, args: quiet.split(" ") });
  try {
    const address = await servers.whole();
    const list = await scriptsOf(browser, address, (page) =>
      page.getByRole("link", { name: /^Demo/ }).first().waitFor(),
    );
    const casePath = await pathOfDemo(browser, address);
    const open = await scriptsOf(browser, `${address}${casePath}`, (page) => page.locator(".curve-plot").waitFor());
    const read = await scriptsOf(browser, `${address}${casePath}`, curveDrawn);
    const later = `and ${((read.bytes - open.bytes) / 1_000).toFixed(0)} kB for the chart a second later, or once the reader comes near it`;
    const floor = await followed(browser, "data:text/html,<title>floor</title>", onAnEmptyPage);
    const pointer = await followed(browser, `${address}${casePath}`, byPointer);
    const keys = await followed(browser, `${address}${casePath}`, byKeys);
    const least = `an empty page that draws one line took ${floor.median.toFixed(1)} and ${floor.late.toFixed(1)} ms`;
    return [
      ...latencyLines("moving a dose by the pointer", pointer, least),
      ...latencyLines("moving a dose by arrow keys", keys, least),
      sizeLine("JavaScript of the first load, the list of cases, after gzip", list, ""),
      sizeLine("JavaScript of the first load, a case opened by its address and at rest, after gzip", open, later),
    ];
  } finally {
    await browser.close();
    await servers.end();
  }
}

function latencyLines(what, { median, late }, least) {
  const against = (share, ours, frames) =>
    line(`${what}: input to painted curve, ${share}`, {
      ours,
      theirs: frameMs,
      unit: "ms",
      ratio: ours / frameMs,
      target: { atMost: frames },
      note: `theirs is a frame; from the input's own time stamp, so waiting for the frame counts; ${least}`,
    });
  return [against("median", median, 1), against("95th percentile", late, 2)];
}

function sizeLine(name, { bytes, files }, later) {
  return line(name, {
    ours: bytes / 1_000,
    theirs: 120,
    unit: "kB",
    ratio: bytes / 120_000,
    target: { atMost: 1 },
    note: [`${files} files`, later].filter(Boolean).join(", "),
  });
}

/** Bytes after gzip of every script a page has fetched once it is at rest, its cache empty. */
async function scriptsOf(browser, address, ready) {
  const context = await browser.newContext();
  const page = await context.newPage();
  await page.addInitScript(watchFrames);
  const scripts = [];
  page.on("response", (response) => {
    if (response.request().resourceType() === "script") scripts.push(response.body());
  });
  await page.goto(address);
  await ready(page);
  await page.waitForLoadState("networkidle");
  const bodies = await Promise.all(scripts);
  await context.close();
  return { bytes: bodies.reduce((sum, body) => sum + gzipSync(body, { level: 9 }).length, 0), files: bodies.length };
}

async function pathOfDemo(browser, address) {
  const page = await browser.newPage();
  await page.goto(address);
  const path = await page.getByRole("link", { name: /^Demo/ }).first().getAttribute("href");
  await page.close();
  return path;
}

/** From each input to the first frame painted after a drawing, in ms: median and 95th percentile of the quickest batch. */
async function followed(browser, address, prepare) {
  const context = await browser.newContext({ viewport: { width: 1400, height: 900 } });
  const page = await context.newPage();
  await page.addInitScript(watchFrames);
  await page.goto(address);
  const { kind, move } = await prepare(page);
  const batches = [];
  for (let batch = 0; batch <= 5; batch++) {
    const latencies = [];
    for (let count = 0; count < 40; count++) latencies.push(await measured(page, kind, () => move(count)));
    // The first batch warms up.
    const drawn = latencies.filter(Number.isFinite);
    if (drawn.length < 30) throw new Error(`only ${drawn.length} of ${latencies.length} moves drew a curve`);
    if (batch > 0) batches.push(drawn);
  }
  await context.close();
  const best = (share) => Math.min(...batches.map((batch) => quantile(batch, share)));
  return { median: best(0.5), late: best(0.95) };
}

/** The chart library comes when its place is near, and last of all. */
async function curveDrawn(page) {
  await page.locator(".curve-plot").scrollIntoViewIfNeeded();
  await page.waitForFunction(() => window.benchDraws() > 0, undefined, { timeout: 20_000 });
}

async function caseReady(page) {
  await curveDrawn(page);
  await page.waitForLoadState("networkidle");
  const mark = page.locator(".dose-mark").nth(1);
  await mark.scrollIntoViewIfNeeded();
  return mark;
}

async function byPointer(page) {
  const { x, y, width, height } = await (await caseReady(page)).boundingBox();
  const [startX, startY] = [x + width / 2, y + height / 2];
  await page.mouse.move(startX, startY);
  await page.mouse.down();
  // Never twice to the same place: a move that snaps to where the dose is already has nothing to draw.
  const at = (count) => startX + 16 + 15 * [0, 1, 2, 3, 2, 1][count % 6];
  return { kind: "pointermove", move: (count) => page.mouse.move(at(count), startY) };
}

async function byKeys(page) {
  await (await caseReady(page)).focus();
  return { kind: "keydown", move: (count) => page.keyboard.press(count % 20 < 10 ? "ArrowRight" : "ArrowLeft") };
}

/** What the browser and this way of measuring take by themselves. */
async function onAnEmptyPage(page) {
  await page.evaluate(() => {
    const context = document.body.appendChild(document.createElement("canvas")).getContext("2d");
    addEventListener("pointermove", ({ clientX }) => {
      requestAnimationFrame(() => {
        context.lineTo(clientX % 300, (clientX * 7) % 150);
        context.stroke();
      });
    });
  });
  return { kind: "pointermove", move: (count) => page.mouse.move(100 + count, 100) };
}

/** Runs in the page. Counts strokes on canvases, and times each input of one kind to the frame that shows it. */
function watchFrames() {
  let draws = 0;
  const stroke = CanvasRenderingContext2D.prototype.stroke;
  CanvasRenderingContext2D.prototype.stroke = function (...rest) {
    draws++;
    return stroke.apply(this, rest);
  };
  window.benchDraws = () => draws;
  /** Watches for the next such input; `benchShown` resolves to its milliseconds, or NaN where nothing is drawn anew. */
  window.benchWatch = (kind) => {
    window.benchShown = new Promise((resolve) => {
      setTimeout(resolve, 1_000, Number.NaN);
      const seen = (event) => {
        const drawsBefore = draws;
        const afterFrame = () => {
          const { port1, port2 } = new MessageChannel();
          // A message sent from a frame's callback arrives once that frame has been painted.
          port1.onmessage = () => {
            if (draws > drawsBefore) resolve(performance.now() - event.timeStamp);
            else requestAnimationFrame(afterFrame);
          };
          port2.postMessage(undefined);
        };
        requestAnimationFrame(afterFrame);
      };
      addEventListener(kind, seen, { capture: true, once: true });
    });
  };
}

async function measured(page, kind, act) {
  await page.evaluate((name) => window.benchWatch(name), kind);
  await act();
  return page.evaluate(() => window.benchShown);
}
