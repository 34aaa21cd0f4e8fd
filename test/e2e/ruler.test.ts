import type { BrowserContextOptions, Locator, Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { expectSound, openPage, twoLooks } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, levelIn, makeCase, openDemo } from "./steps.ts";

const program = runningProgram();

async function openPlan(
  label: string,
  options: BrowserContextOptions = { viewport: { width: 1400, height: 1000 } },
): Promise<{ page: Page; faults: string[] }> {
  const opened = await openPage(program(), options);
  await makeCase(opened.page, label, "UTC");
  await fillSetting(opened.page, {
    start: "2026-03-02 08:00",
    horizonH: "48",
    volumeL: "40",
    clearanceLPerH: "5",
    low: "5",
    high: "15",
  });
  await addInfusion(opened.page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
  await curveDrawn(opened.page);
  return opened;
}

function mark(page: Page, dose: number): Locator {
  return page
    .getByRole("group", { name: /^Doses of alternative/ })
    .getByRole("button", { name: new RegExp(`^dose ${dose},`, "i") });
}

async function timeOf(dose: Locator): Promise<string> {
  const [, time] = / (\d\d:\d\d),/.exec((await dose.getAttribute("aria-label")) ?? "") ?? [];
  return time ?? "";
}

describe("the ruler", () => {
  test.for(twoLooks)(
    "a dose moves by arrow keys in steps, the levels follow, and undo brings it back, at $name",
    async ({ options }) => {
      const { page, faults } = await openPlan("Keys on the ruler", options);
      await field(page, "Time of the cursor").fill("2026-03-02 18:00");
      await page.keyboard.press("Enter");
      const level = async () => levelIn(await page.getByRole("region", { name: "Levels at the cursor" }).innerText());
      const before = await level();
      await mark(page, 2).focus();
      for (let step = 0; step < 4; step++) await page.keyboard.press("ArrowRight");
      await expect.poll(() => timeOf(mark(page, 2))).toBe("17:00");
      expect(await page.evaluate(() => document.activeElement?.getAttribute("aria-label"))).toMatch(/^dose 2,/i);
      // One hour later there is an hour's less decay of the second dose, whose infusion has just ended at 18:00.
      // Both levels are read out to a hundredth.
      const expected = before + 100 * (1 - Math.exp(-0.125)) * (1 - Math.exp(-0.125));
      await expect.poll(async () => Math.abs((await level()) - expected)).toBeLessThanOrEqual(0.0101);
      await page.keyboard.press("ArrowLeft");
      await expect.poll(() => timeOf(mark(page, 2))).toBe("16:45");
      await page.getByRole("button", { name: "Undo" }).click();
      await expect.poll(() => timeOf(mark(page, 2))).not.toBe("16:45");
      while (await page.getByRole("button", { name: "Undo" }).isEnabled()) {
        if ((await timeOf(mark(page, 2))) === "16:00") break;
        await page.getByRole("button", { name: "Undo" }).click();
      }
      expect(await level()).toBeCloseTo(before, 3);
      await page.getByRole("button", { name: "Redo" }).click();
      await expect.poll(() => timeOf(mark(page, 2))).not.toBe("16:00");
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );

  test("a dose is dragged by the pointer, snaps, and the whole drag is one undo", async () => {
    const { page, faults } = await openPlan("Pointer on the ruler");
    await mark(page, 3).scrollIntoViewIfNeeded();
    const box = (await mark(page, 3).boundingBox())!;
    const next = (await mark(page, 4).boundingBox())!;
    const perHour = (next.x - box.x) / 8;
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    for (let step = 1; step <= 10; step++)
      await page.mouse.move(box.x + box.width / 2 + (perHour * 2 * step) / 10 + 1, box.y + 4);
    await page.mouse.up();
    await expect.poll(() => timeOf(mark(page, 3))).toBe("02:00");
    await page.getByRole("button", { name: "Undo" }).click();
    await expect.poll(() => timeOf(mark(page, 3))).toBe("00:00");
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("a dose is typed, and deleted by key", async () => {
    const { page } = await openPlan("Typing on the ruler");
    await mark(page, 2).focus();
    await page.keyboard.press("Enter");
    const editor = page.getByRole("form", { name: /^Change dose 2/i });
    await field(editor, "Time of the dose").fill("2026-03-02 17:20");
    await field(editor, "Amount").fill("0,5");
    await page.keyboard.press("Tab");
    await editor.getByText(/must be written without a comma/).waitFor();
    await field(editor, "Amount").fill("400");
    await expectSound(page);
    await editor.getByRole("button", { name: "Change the dose" }).click();
    await expect
      .poll(() => mark(page, 2).getAttribute("aria-label"))
      .toMatch(/400\s*mg over 1\s*h, Mon 2 Mar 2026 17:20, planned, other than the rest/);
    await mark(page, 3).focus();
    await page.keyboard.press("Delete");
    await expect.poll(() => mark(page, 3).count()).toBe(0);
    await page.getByText("dose 3 is left out").waitFor();
    await page.getByRole("button", { name: "As the rest again, dose 3" }).click();
    await expect.poll(() => mark(page, 3).count()).toBe(1);
    await page.context().close();
  });

  test("a dose does not leave the plan", async () => {
    const { page } = await openPlan("The plan's beginning");
    await mark(page, 1).focus();
    await page.keyboard.press("ArrowLeft");
    expect(await timeOf(mark(page, 1))).toBe("08:00");
    await page.context().close();
  });

  test("a dose moved by keys keeps the focus out of view, among many others, and when a bunch is opened", async () => {
    const { page, faults } = await openPlan("Focus on the ruler");
    const focused = () => page.evaluate(() => document.activeElement?.getAttribute("aria-label") ?? "nothing");
    await page.getByRole("button", { name: "Closer" }).click();
    await page.getByRole("button", { name: "Closer" }).click();
    await mark(page, 2).focus();
    for (let step = 0; step < 16; step++) await page.keyboard.press("Shift+ArrowRight");
    await expect.poll(focused).toMatch(/^dose 2, .* Tue 3 Mar 2026 08:00/i);
    await page.getByRole("button", { name: "Whole plan" }).click();
    await addInfusion(page, { amountMg: "50", durationH: "0.1", at: "2026-03-02 10:00", intervalH: "0.5" });
    await page.locator("button.mark-bunch").first().focus();
    await page.keyboard.press("Enter");
    await expect.poll(focused).toMatch(/^dose \d+ of order 2, /i);
    await page.getByRole("button", { name: "Whole plan" }).click();
    await page.locator(".dose-mark[tabindex='0']").focus();
    const name = /^dose \d+ of order 2,/i.exec(await focused())![0];
    for (let step = 0; step < 3; step++) {
      await page.keyboard.press("ArrowRight");
      await expect.poll(focused).toMatch(new RegExp(`^${name}`, "i"));
    }
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("a print shows the whole picture, dark on light, in proportion", async () => {
    const { page, faults } = await openPage(program(), {
      viewport: { width: 1400, height: 900 },
      colorScheme: "dark",
    });
    await openDemo(page);
    const picture = () =>
      page.evaluate(() => {
        const stage = document.querySelector<HTMLElement>(".curve-stage")!;
        const canvas = stage.querySelector("canvas")!;
        const marks = [...stage.querySelectorAll(".dose-mark")].map((each) => each.getBoundingClientRect().right);
        const { data } = canvas.getContext("2d")!.getImageData(0, 0, canvas.width, canvas.height);
        let darkest = 255;
        for (let at = 0; at < data.length; at += 4)
          if (data[at + 3] === 255) darkest = Math.min(darkest, Math.max(data[at]!, data[at + 1]!, data[at + 2]!));
        return {
          stagePx: stage.offsetWidth,
          canvasPx: canvas.offsetWidth,
          stretched: canvas.width / canvas.height / (canvas.offsetWidth / canvas.offsetHeight),
          overBy: Math.max(...marks) - stage.getBoundingClientRect().right,
          darkest,
        };
      });
    await page.locator(".curve-stage").scrollIntoViewIfNeeded();
    await expect.poll(async () => (await picture()).canvasPx).toBeGreaterThan(1_000);
    await page.evaluate(() => {
      dispatchEvent(new Event("beforeprint"));
    });
    const printed = await picture();
    expect(printed.stagePx).toBeLessThan(700);
    expect(printed.canvasPx).toBeLessThanOrEqual(printed.stagePx);
    expect(printed.stretched).toBeCloseTo(1, 1);
    expect(printed.overBy).toBeLessThanOrEqual(0);
    expect(printed.darkest).toBeLessThan(100);
    await page.evaluate(() => {
      dispatchEvent(new Event("afterprint"));
    });
    await expect.poll(async () => (await picture()).canvasPx).toBeGreaterThan(1_000);
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("the cursor is a slider that reads out levels; zoom and axis change the picture, not the numbers", async () => {
    const { page, faults } = await openPage(program(), { viewport: { width: 1400, height: 1000 } });
    await openDemo(page);
    const slider = page.getByRole("slider", { name: /^Cursor/ });
    await slider.focus();
    await page.keyboard.press("Home");
    await page.keyboard.press("PageUp");
    await expect.poll(() => slider.getAttribute("aria-valuetext")).toMatch(/Sat 28 Mar 2026 08:00.*mg\/L/);
    const said = await slider.getAttribute("aria-valuetext");
    await page.getByRole("button", { name: "Closer" }).click();
    await page.getByRole("radio", { name: "logarithmic" }).check();
    await page.getByRole("button", { name: "Later →" }).click();
    expect(await slider.getAttribute("aria-valuetext")).toBe(said);
    await expectSound(page);
    await page.getByRole("button", { name: "Whole plan" }).click();
    expect(faults).toEqual([]);
    await page.context().close();
  });
});
