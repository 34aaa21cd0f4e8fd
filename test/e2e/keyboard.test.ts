import { describe, expect, test } from "vitest";
import { openPage } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { curveDrawn, openDemo } from "./steps.ts";

const program = runningProgram();

describe("the keyboard alone", () => {
  test("makes a case, gives kinetics and an order, moves a dose and saves", async () => {
    const { page, faults } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await page.goto("/");
    await page.getByRole("link", { name: /^Demo/ }).waitFor();
    const tabTo = async (selector: string) => {
      for (let press = 0; press < 400; press++) {
        if (await page.evaluate((wanted) => document.activeElement?.matches(wanted) ?? false, selector)) return;
        await page.keyboard.press("Tab");
      }
      throw new Error(`Tab never reached ${selector}`);
    };
    const type = async (selector: string, text: string) => {
      await tabTo(selector);
      await page.keyboard.press("Control+A");
      await page.keyboard.type(text);
    };
    await type("#new-label", "By keyboard");
    await type("#new-zone", "UTC");
    await page.keyboard.press("Enter");
    await page.waitForURL(/\/cases\//);
    await page.getByRole("heading", { name: "Who and what drug" }).waitFor();
    await type("#setting-start", "2026-03-02 08:00");
    await type("#setting-horizonH", "48");
    await type("#setting-volumeL", "40");
    await type("#setting-clearanceLPerH", "5");
    await tabTo("#order-add");
    await page.keyboard.press("Enter");
    await page.keyboard.type("500");
    await type("#order-new-duration", "1");
    await type("#order-new-at", "2026-03-02 08:00");
    await type("#order-new-interval", "8");
    await page.keyboard.press("Enter");
    await curveDrawn(page);
    await tabTo(".dose-mark");
    await page.keyboard.press("ArrowRight");
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute("aria-label"))).toMatch(/08:15/);
    await page.keyboard.press("Control+z");
    await expect.poll(() => page.locator(".dose-mark").first().getAttribute("aria-label")).toMatch(/08:00/);
    await type("#save-reason", "typed on the keyboard");
    await type("#save-preparedBy", "Invented Person");
    await page.keyboard.press("Enter");
    await page.getByText("Saved as revision 1.").waitFor();
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("always shows where it is, and what has the focus is not hidden", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await openDemo(page);
    const hidden: string[] = [];
    const unmarked: string[] = [];
    for (let press = 0; press < 120; press++) {
      await page.keyboard.press("Tab");
      const seen = await page.evaluate(() => {
        const element = document.activeElement;
        if (!(element instanceof HTMLElement) || element === document.body) return undefined;
        const box = element.getBoundingClientRect();
        const style = getComputedStyle(element);
        const label = element.closest("label");
        const marked =
          style.outlineStyle !== "none" ||
          style.boxShadow !== "none" ||
          (label !== null && getComputedStyle(label).outlineStyle !== "none");
        const top = document.querySelector(".top")?.getBoundingClientRect().bottom ?? 0;
        const inTop = element.closest(".top") !== null;
        return {
          name: element.id || element.textContent?.trim().slice(0, 40) || element.tagName,
          marked,
          covered: !inTop && box.bottom <= top && box.height > 0,
        };
      });
      if (seen === undefined) break;
      if (seen.covered) hidden.push(seen.name);
      if (!seen.marked) unmarked.push(seen.name);
    }
    expect(hidden).toEqual([]);
    expect(unmarked).toEqual([]);
    await page.context().close();
  });
});
