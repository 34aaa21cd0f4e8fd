import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";

/** Room left of the plot for the level axis and the names of the lanes, right of it for the letters. */
export const gutters = { leftPx: 52, rightPx: 22 } as const;

/** Closer than this, a minute would be wider than a thumb. */
const narrowestH = 0.5;

/** Pixels from the plot's left edge to an hour. */
export function pixelAt(atH: number, window: TimeWindow, plotPx: number): number {
  return ((atH - window.fromH) / (window.toH - window.fromH)) * plotPx;
}

/** The hour at a pixel of the plot. */
export function hourAt(pixel: number, window: TimeWindow, plotPx: number): number {
  return window.fromH + (pixel / Math.max(1, plotPx)) * (window.toH - window.fromH);
}

/** A window that lies within the plan and is neither empty nor longer than it. */
export function windowWithin(window: TimeWindow, horizonH: number): TimeWindow {
  const lengthH = Math.min(horizonH, Math.max(Math.min(narrowestH, horizonH), window.toH - window.fromH));
  const fromH = Math.min(Math.max(0, window.fromH), horizonH - lengthH);
  return { fromH, toH: Math.min(horizonH, fromH + lengthH) };
}

/** The window made `times` as wide; what stands at `aroundH` keeps its place. */
export function zoomed(window: TimeWindow, times: number, aroundH: number, horizonH: number): TimeWindow {
  const lengthH = Math.min(horizonH, Math.max(Math.min(narrowestH, horizonH), (window.toH - window.fromH) * times));
  const share = (aroundH - window.fromH) / (window.toH - window.fromH);
  const fromH = aroundH - share * lengthH;
  return windowWithin({ fromH, toH: fromH + lengthH }, horizonH);
}

/** The window moved by some hours, as far as the plan goes. */
export function panned(window: TimeWindow, byH: number, horizonH: number): TimeWindow {
  return windowWithin({ fromH: window.fromH + byH, toH: window.toH + byH }, horizonH);
}

/** The window moved just so far that it holds an hour. */
export function holding(window: TimeWindow, atH: number, horizonH: number): TimeWindow {
  if (atH < window.fromH) return panned(window, atH - window.fromH, horizonH);
  return atH > window.toH ? panned(window, atH - window.toH, horizonH) : window;
}
