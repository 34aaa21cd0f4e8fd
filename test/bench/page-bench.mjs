import { gzipSync } from "node:zlib";
import { chromium } from "playwright-core";
import { findChromium } from "../e2e/find-chromium.mjs";
import { serverGroup } from "./started-server.mjs";
import { line, notMeasured, quantile } from "./timing.mjs";

const frameMs = 1_000 / 60;
const quiet = "--no-sandbox --disable-gpu --disable-quic --no-first-run --disable-background-networking --disable-component-update --disable-sync";

/** In a real Chromium: how soon the curve follows a moved dose, and how much JavaScript the first load takes. */
export async function pageBenchmarks() {
  const executablePath = findChromium();
  if (executablePath === undefined) return [notMeasured("the page in a browser", "no Chromium is there")];
  const servers = serverGroup();
  const browser = await chromium.launch({ executablePath, args: quiet.split(" ") });
  try {
    const address = await servers.whole();
    const list = await scriptsOf(browser, address, (page) => page.getByRole("link", { name: /^Demo/ }).first().waitFor());
    const casePath = await pathOfDemo(browser, address);
    const open = await scriptsOf(browser, `${address}${casePath}`, (page) => page.locator(".dose-mark").first().waitFor());
    const pointer = await followed(browser, `${address}${casePath}`, byPointer);
    const keys = await followed(browser, `${address}${casePath}`, byKeys);
    return [
      ...latencyLines("moving a dose by the pointer", pointer),
      ...latencyLines("moving a dose by arrow keys", keys),
      sizeLine("JavaScript of the first load, the list of cases, after gzip", list),
      sizeLine("JavaScript of the first load, a case opened by its address and at rest, after gzip", open),
    ];
  } finally {
    await browser.close();
    await servers.end();
  }
}

function latencyLines(what, latencies) {
  const note = `${latencies.length} moves; from the input's own time stamp, so waiting for the frame counts`;
  const ours = (share) => quantile(latencies, share);
  return [
    line(`${what}: input to painted curve, median`, {
      ours: ours(0.5),
      theirs: frameMs,
      unit: "ms",
      ratio: ours(0.5) / frameMs,
      target: { atMost: 1 },
      note,
    }),
    line(`${what}: input to painted curve, 95th percentile`, {
      ours: ours(0.95),
      theirs: frameMs,
      unit: "ms",
      ratio: ours(0.95) / frameMs,
      target: { atMost: 2 },
      note,
    }),
  ];
}

function sizeLine(name, { bytes, files }) {
  return line(name, {
    ours: bytes / 1_000,
    theirs: 120,
    unit: "kB",
    ratio: bytes / 120_000,
    target: { atMost: 1 },
    note: `${files} files`,
  });
}

/** Bytes after gzip of every script a page has fetched once it is at rest, its cache empty. */
async function scriptsOf(browser, address, ready) {
  const context = await browser.newContext();
  const page = await context.newPage();
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

/** Milliseconds from each input to the first frame painted after the curve had been drawn anew. */
async function followed(browser, address, move) {
  const context = await browser.newContext({ viewport: { width: 1400, height: 900 } });
  const page = await context.newPage();
  await page.addInitScript(watchFrames);
  await page.goto(address);
  await page.locator(".dose-mark").first().waitFor();
  await page.waitForLoadState("networkidle");
  await page.waitForFunction(() => window.benchDraws() > 0);
  const latencies = await move(page);
  await context.close();
  return latencies;
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
  /** Resolves to the milliseconds of the next such input, once a frame painted after a new drawing is out. */
  window.benchNext = (kind) =>
    new Promise((resolve) => {
      addEventListener(
        kind,
        (event) => {
          const drawsBefore = draws;
          const afterFrame = () => {
            const { port1, port2 } = new MessageChannel();
            port1.onmessage = () => {
              if (draws > drawsBefore) resolve(performance.now() - event.timeStamp);
              else if (performance.now() - event.timeStamp > 2_000) resolve(Number.NaN);
              else requestAnimationFrame(afterFrame);
            };
            port2.postMessage(undefined);
          };
          requestAnimationFrame(afterFrame);
        },
        { capture: true, once: true },
      );
    });
}

async function measured(page, kind, act) {
  const next = page.evaluate((name) => window.benchNext(name), kind);
  await act();
  return next;
}

async function byPointer(page) {
  const mark = page.locator(".dose-mark").nth(1);
  await mark.scrollIntoViewIfNeeded();
  const { x, y, width, height } = await mark.boundingBox();
  const [startX, startY] = [x + width / 2, y + height / 2];
  await page.mouse.move(startX, startY);
  await page.mouse.down();
  await page.mouse.move(startX + 12, startY);
  const latencies = [];
  for (let count = 0; count < 160; count++) {
    const offset = 12 + 40 * (1 + Math.sin(count / 3));
    latencies.push(await measured(page, "pointermove", () => page.mouse.move(startX + offset, startY)));
  }
  await page.mouse.up();
  return drawn(latencies);
}

async function byKeys(page) {
  await page.locator(".dose-mark").nth(1).focus();
  const latencies = [];
  for (let count = 0; count < 120; count++) {
    const key = count % 20 < 10 ? "ArrowRight" : "ArrowLeft";
    latencies.push(await measured(page, "keydown", () => page.keyboard.press(key)));
  }
  return drawn(latencies);
}

/** A move that snaps to where the dose is already draws nothing; most must draw. The first few warm up. */
function drawn(latencies) {
  const kept = latencies.slice(10).filter(Number.isFinite);
  if (kept.length < 60) throw new Error(`only ${kept.length} of ${latencies.length} moves drew a curve`);
  return kept;
}
