import type { Locator, Page } from "playwright-core";
import { expect } from "vitest";

/** What a person does on the pages, in the words that stand there. */

export async function makeCase(page: Page, label: string, timeZone = "Europe/London"): Promise<void> {
  await page.goto("/");
  await page.getByRole("textbox", { name: "Label", exact: true }).fill(label);
  await page.getByRole("combobox", { name: "Time zone" }).fill(timeZone);
  await page.getByRole("textbox", { name: "Notes", exact: true }).fill("Invented for a browser test.");
  await page.getByRole("button", { name: "Make the case" }).click();
  await page.getByRole("heading", { name: "Who and what drug" }).waitFor();
}

export async function openDemo(page: Page): Promise<void> {
  await page.goto("/");
  await page.getByRole("link", { name: /^Demo \(invented\)/ }).click();
  await page.getByRole("heading", { name: "Who and what drug" }).waitFor();
  await curveDrawn(page);
}

export async function curveDrawn(page: Page): Promise<void> {
  await page.locator(".curve-stage canvas").waitFor();
}

/** A text field by the words of its label, wherever on the page it stands. */
export function field(within: Page | Locator, name: string | RegExp): Locator {
  return within.getByRole("textbox", { name }).first();
}

export interface Setting {
  readonly start: string;
  readonly horizonH: string;
  readonly volumeL: string;
  readonly clearanceLPerH: string;
  readonly low?: string;
  readonly high?: string;
}

export async function fillSetting(page: Page, setting: Setting): Promise<void> {
  await field(page, "Start of the plan").fill(setting.start);
  await field(page, "Length of the plan").fill(setting.horizonH);
  await field(page, /^Volume of distribution/).fill(setting.volumeL);
  await field(page, /^Clearance/).fill(setting.clearanceLPerH);
  if (setting.low !== undefined) await field(page, "Desired range, low end").fill(setting.low);
  if (setting.high !== undefined) await field(page, "Desired range, high end").fill(setting.high);
  await page.keyboard.press("Tab");
}

export interface InfusionOrder {
  readonly amountMg: string;
  readonly durationH: string;
  readonly at: string;
  readonly intervalH?: string;
}

/** Adds an infusion to the alternative being edited: once, or every so many hours with no end. */
export async function addInfusion(page: Page, order: InfusionOrder): Promise<void> {
  await page.getByRole("button", { name: "Add an order" }).click();
  const form = page.getByRole("form", { name: "New order" });
  await form.getByRole("radio", { name: "infusion" }).check();
  await field(form, "Amount").fill(order.amountMg);
  await field(form, "Infusion duration").fill(order.durationH);
  if (order.intervalH !== undefined) {
    await form.getByRole("radio", { name: "every so many hours" }).check();
    await field(form, "Interval").fill(order.intervalH);
  } else await form.getByRole("radio", { name: "once" }).check();
  await field(form, order.intervalH === undefined ? "Given at" : "From").fill(order.at);
  await form.getByRole("button", { name: "Apply" }).click();
  await form.waitFor({ state: "detached" });
}

/** Saves the alternative being edited and waits for the revision. */
export async function save(page: Page, reason: string, number: number): Promise<void> {
  await field(page, "Reason for this revision").fill(reason);
  await field(page, "Prepared by").fill("Invented Person");
  await page.getByRole("button", { name: new RegExp(`^Save as revision ${number} of`) }).click();
  await page.getByText(`Saved as revision ${number}.`).waitFor();
}

/** Numbers of a page's table, row by row, as they are read. */
export async function tableText(table: Locator): Promise<string[][]> {
  return table.evaluate((element: HTMLTableElement) =>
    [...element.rows].map((row) => [...row.cells].map((cell) => cell.innerText.replace(/[\s\u00a0]+/g, " ").trim())),
  );
}

/** The first level that a text names, in mg/L. */
export function levelIn(text: string | null): number {
  const [, number] = /([\d,.]+)[\s\u00a0]mg\/L/.exec(text ?? "") ?? [];
  expect(number, `a level in ${text}`).toBeDefined();
  return Number(number!.replaceAll(",", ""));
}
