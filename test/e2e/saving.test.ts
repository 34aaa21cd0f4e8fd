import type { BrowserContextOptions } from "playwright-core";
import { describe, expect, test } from "vitest";
import { expectSound, openPage, twoLooks } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, makeCase, save, tableText } from "./steps.ts";

const program = runningProgram();

async function openSaved(label: string, options: BrowserContextOptions = { viewport: { width: 1400, height: 900 } }) {
  const opened = await openPage(program(), options);
  await makeCase(opened.page, label, "UTC");
  await fillSetting(opened.page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
  await addInfusion(opened.page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
  await curveDrawn(opened.page);
  await save(opened.page, "first plan", 1);
  return opened;
}

async function changeAmount(page: Awaited<ReturnType<typeof openSaved>>["page"], amountMg: string) {
  await page.getByRole("button", { name: "Edit order 1" }).click();
  const form = page.getByRole("form", { name: "Order 1" });
  await field(form, "Amount").fill(amountMg);
  await form.getByRole("button", { name: "Apply" }).click();
  await form.waitFor({ state: "detached" });
}

describe("saving", () => {
  test.for(twoLooks)(
    "revisions are numbered, compared field by field and curve by curve, and taken up again, at $name",
    async ({ options }) => {
      const { page, faults } = await openSaved("Revisions", options);
      await changeAmount(page, "400");
      await save(page, "smaller doses", 2);
      await page.getByRole("button", { name: "Compare any two revisions" }).click();
      await page.getByRole("heading", { name: "Two revisions compared" }).waitFor();
      const choices = await page.locator("#compare-before option").allInnerTexts();
      await page
        .locator("#compare-before")
        .selectOption({ label: choices.find((choice) => choice.endsWith("revision 1"))! });
      const differs = page.getByRole("region", { name: "What differs" }).getByRole("table");
      await differs.waitFor();
      const rows = await tableText(differs);
      expect(rows.find(([what]) => what === "Order 1: what")).toEqual([
        "Order 1: what",
        "500 mg over 1 h (500 mg per hour)",
        "400 mg over 1 h (400 mg per hour)",
      ]);
      await expectSound(page);
      await page.getByRole("button", { name: /^Take up .*again.* revision 1$/ }).click();
      await expect.poll(() => page.locator("#order-0").innerText()).toMatch(/500\s*mg/);
      await save(page, "back to the first", 3);
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );

  test("a save from an older revision shows both and loses nothing", async () => {
    const { page } = await openSaved("Two people");
    const other = await page.context().newPage();
    await other.goto(page.url());
    await curveDrawn(other);
    await changeAmount(page, "450");
    await save(page, "changed here", 2);
    await changeAmount(other, "350");
    await field(other, "Reason for this revision").fill("changed there");
    await field(other, "Prepared by").fill("Invented Person");
    await other.getByRole("button", { name: /^Save as revision 2/ }).click();
    const note = other.getByRole("alert").filter({ hasText: "Somebody saved in between" });
    await note.waitFor();
    expect((await note.innerText()).replaceAll("\u00a0", " ")).toContain("350 mg");
    await note.getByRole("button", { name: "Save yours on top of it" }).click();
    await other.getByText("Saved as revision 3.").waitFor();
    await page.context().close();
  });

  test("a retry after a lost answer makes no second revision", async () => {
    const { page } = await openSaved("Lost answers");
    await changeAmount(page, "450");
    await field(page, "Reason for this revision").fill("answer lost");
    await field(page, "Prepared by").fill("Invented Person");
    let lost = 0;
    await page.route("**/revisions", async (route) => {
      if (route.request().method() !== "POST" || lost++ > 0) return route.continue();
      await route.fetch();
      await route.abort("connectionreset");
    });
    await page.getByRole("button", { name: /^Save as revision 2/ }).click();
    const alert = page.getByRole("alert").filter({ hasText: "cannot be reached" });
    await alert.waitFor();
    expect(await field(page, "Reason for this revision").inputValue()).toBe("answer lost");
    await alert.getByRole("button", { name: "Try again" }).click();
    await page.getByText("Saved as revision 2.").waitFor();
    await page.unroute("**/revisions");
    await page.reload();
    await page.getByRole("heading", { name: "Revisions of alternative A" }).waitFor();
    await expect
      .poll(() =>
        page
          .getByRole("region", { name: /^Revisions of alternative/ })
          .getByRole("rowheader")
          .count(),
      )
      .toBe(2);
    await page.context().close();
  });

  test("a caution that stops must be answered, and the answer is kept for that value only", async () => {
    const { page } = await openSaved("Stops");
    await field(page, /^Volume of distribution/).fill("0.15");
    await field(page, /^Clearance/).fill("0.015");
    await page.keyboard.press("Tab");
    await page.getByRole("heading", { name: "Reasons for going on" }).waitFor();
    await field(page, "Reason for this revision").fill("a tiny volume");
    await field(page, "Prepared by").fill("Invented Person");
    await page.getByRole("button", { name: /^Save as revision 2/ }).click();
    await page.getByRole("alert").filter({ hasText: "Reason for going on is needed" }).waitFor();
    await expectSound(page);
    for (const reason of await page.getByRole("textbox", { name: "Reason for going on" }).all())
      await reason.fill("invented for a test");
    await page.getByRole("button", { name: /^Save as revision 2/ }).click();
    await page.getByText("Saved as revision 2.").waitFor();
    await field(page, /^Volume of distribution/).fill("0.16");
    await page.keyboard.press("Tab");
    await expect.poll(() => page.getByRole("textbox", { name: "Reason for going on" }).first().inputValue()).toBe("");
    await page.context().close();
  });
});
