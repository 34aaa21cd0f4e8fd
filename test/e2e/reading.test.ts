import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import type { Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { expectSound, openPage, twoLooks } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, levelIn, makeCase, openDemo, tableText } from "./steps.ts";

const program = runningProgram();

async function csvFrom(page: Page, button: string): Promise<string[][]> {
  const download = page.waitForEvent("download");
  await page.getByRole("button", { name: button }).click();
  const text = readFileSync(await (await download).path(), "utf8");
  expect(text).toContain("\r\n");
  return parse(text, { bom: true }) as string[][];
}

describe("reading a case", () => {
  test.for(twoLooks)(
    "what remains adds up to the level, in the table, the picture and the file, at $name",
    async ({ options }) => {
      const { page, faults } = await openPage(program(), options);
      await openDemo(page);
      await field(page, "Time of the cursor").fill("2026-03-28 10:00");
      await page.keyboard.press("Enter");
      const table = page.getByRole("region", { name: "Parts of the level" }).getByRole("table");
      await expect.poll(async () => (await tableText(table)).length).toBeGreaterThan(3);
      const rows = await tableText(table);
      const parts = rows.slice(1, -1).map((row) => levelIn(row[3]!));
      const sum = levelIn(rows.at(-1)![1]!);
      // Each part is rounded to four digits.
      expect(parts.reduce((total, part) => total + part, 0)).toBeCloseTo(sum, 1);
      expect(sum).toBe(levelIn(await page.getByRole("region", { name: "Levels at the cursor" }).innerText()));
      const file = await csvFrom(page, "Parts as CSV");
      const shares = file.slice(1).map((row) => Number(row[4]));
      expect(shares.reduce((total, share) => total + share, 0)).toBeCloseTo(100, 9);
      await expectSound(page);
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );

  test.for(twoLooks)(
    "figures stand side by side with marks in words, and go out as a file, at $name",
    async ({ options }) => {
      const { page } = await openPage(program(), options);
      await openDemo(page);
      const table = page.getByRole("table", { name: "Figures of the alternatives" });
      const rows = await tableText(table);
      expect(rows[0]!.length).toBe(4);
      const text = await table.innerText();
      expect(text).toContain("below the range");
      expect(text).toMatch(/best: (most|fewest|earliest)/);
      const file = await csvFrom(page, "Figures as CSV");
      expect(file.length).toBeGreaterThan(25);
      await field(page, "Start of the 24 hours of the area").fill("2026-03-29 09:00");
      await page.keyboard.press("Tab");
      await expect
        .poll(async () => (await tableText(table)).find(([name]) => name!.startsWith("Area over the chosen"))![1])
        .toContain("Sun 29 Mar 2026 09:00");
      await page.getByRole("radio", { name: "the plan alone" }).check();
      await expect
        .poll(async () => (await tableText(table)).find(([name]) => name!.startsWith("First trough"))![1])
        .toContain("Fri 27 Mar 2026 16:00");
      await page.context().close();
    },
  );

  test("the levels stand in a table and go out as a file", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await openDemo(page);
    await page.getByText("The levels as a table").click();
    await expectSound(page);
    const file = await csvFrom(page, "Table of the whole plan as CSV");
    expect(file[0]![0]).toBe("Clock time (Europe/London)");
    expect(file.length).toBeGreaterThan(90);
    await page.context().close();
  });

  test("says how long to wait, exactly, with and without further doses", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await makeCase(page, "Waiting", "UTC");
    await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
    await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
    await curveDrawn(page);
    await field(page, "Time of the cursor").fill("2026-03-02 09:00");
    await page.keyboard.press("Enter");
    await field(page, "Level to wait for").fill("2");
    const table = page.getByRole("region", { name: "Waiting times" }).getByRole("table");
    const [, row] = await tableText(table);
    // From the peak of 100 (1 - e^-0.125) mg/L: t = ln(peak / 2) / 0.125.
    const waitH = Math.log((100 * (1 - Math.exp(-0.125))) / 2) / 0.125;
    expect(row![1]).toContain(`${Number(waitH.toPrecision(4))} h to wait`);
    expect(row![3]).toContain("not before the plan ends");
    await page.context().close();
  });

  test("works the arithmetic on the page as on the sheet", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await openDemo(page);
    await page.getByText(/^How the figures of .* come about/).click();
    await page.getByText("A = 1 ÷ (1 − e^(−k × P))").waitFor();
    await expectSound(page);
    await page.context().close();
  });
});
