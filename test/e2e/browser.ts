import AxeBuilder from "@axe-core/playwright";
import { type Browser, type BrowserContextOptions, chromium, type Page } from "playwright-core";
import { expect } from "vitest";
import { findChromium } from "./find-chromium.mjs";
import type { RunningProgram } from "./program.ts";

const quiet = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** A real Chromium without a window. */
export function openBrowser(): Promise<Browser> {
  const executablePath = findChromium();
  if (executablePath === undefined) throw new Error("no Chromium: npm test says how to bring one");
  return chromium.launch({ executablePath, args: quiet });
}

export interface Look {
  readonly name: string;
  readonly options: BrowserContextOptions;
}

/** The four ways every screen must hold up in. */
export const looks: readonly Look[] = [
  { name: "360 px, light", options: { viewport: { width: 360, height: 780 }, colorScheme: "light" } },
  { name: "360 px, dark", options: { viewport: { width: 360, height: 780 }, colorScheme: "dark" } },
  { name: "1400 px, light", options: { viewport: { width: 1400, height: 900 }, colorScheme: "light" } },
  { name: "1400 px, dark", options: { viewport: { width: 1400, height: 900 }, colorScheme: "dark" } },
];

/** The widest in the light and the narrowest in the dark, for whole tasks. */
export const twoLooks = [looks[2]!, looks[1]!] as const;

/** A page of its own (storage included) that fails the test on any error the page throws or logs. */
export async function openPage(
  { browser, server: { address } }: RunningProgram,
  options: BrowserContextOptions = {},
): Promise<{ page: Page; faults: string[] }> {
  const context = await browser.newContext({
    baseURL: address,
    reducedMotion: "reduce",
    acceptDownloads: true,
    ...options,
  });
  const page = await context.newPage();
  page.setDefaultTimeout(15_000);
  const faults: string[] = [];
  page.on("pageerror", (error) => faults.push(String(error)));
  page.on("console", (message) => {
    if (message.type() === "error") faults.push(message.text());
  });
  return { page, faults };
}

/** axe must find nothing, and the page must not be wider than the window. */
export async function expectSound(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(" ")).join("; ")}`)).toEqual(
    [],
  );
  const overflow = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(overflow, "the page is wider than the window").toBeLessThanOrEqual(0);
}
