import { describe, expect, test } from "vitest";
import { expectSound, openPage } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { curveDrawn, field, fillSetting, makeCase } from "./steps.ts";

const program = runningProgram();

async function openFilled(label: string) {
  const opened = await openPage(program(), { viewport: { width: 1400, height: 900 } });
  await makeCase(opened.page, label);
  await fillSetting(opened.page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
  return opened;
}

describe("mistakes in the setting", () => {
  test.for([
    { name: /^Volume of distribution/, text: "0.001", says: /must be from 0\.01\s*L to 50,000\s*L, got 0\.001\s*L/ },
    { name: /^Volume of distribution/, text: "-4", says: /must be from 0\.01/ },
    { name: /^Volume of distribution/, text: "0", says: /must be from 0\.01/ },
    { name: /^Volume of distribution/, text: "NaN", says: /must be a plain number/ },
    { name: /^Clearance/, text: "5,5", says: /must be written without a comma/ },
    { name: /^Half-life/, text: "26280", says: /must be from 0\.01\s*h to 9,900\s*h, got 26,280\s*h/ },
    { name: /^Elimination rate constant/, text: "0.2", says: /disagrees with .*percent apart/ },
    { name: /^Length of the plan/, text: "438000", says: /must be from 0\.1\s*h to 17,568\s*h/ },
    { name: /^Start of the plan/, text: "2026-02-30 08:00", says: /must be a date and 24-hour time/ },
    { name: /^Desired range, low end/, text: "-1", says: /must be from 0/ },
  ])("$text in $name is refused beside the field and stays as typed", async ({ name, text, says }) => {
    const { page } = await openFilled(`Refused ${text}`);
    const input = field(page, name);
    await input.fill(text);
    await page.keyboard.press("Tab");
    const box = page.locator(".field", { has: input });
    await expect.poll(() => box.innerText()).toMatch(says);
    expect(await input.getAttribute("aria-invalid")).toBe("true");
    expect(await input.inputValue()).toBe(text);
    await expectSound(page);
    await page.context().close();
  });

  test("a clock time that comes twice is read by a stated rule, and the second can be chosen", async () => {
    const { page } = await openFilled("Autumn night");
    await field(page, "Start of the plan").fill("2026-10-25 01:30");
    await page.keyboard.press("Tab");
    const setting = page.getByRole("region", { name: "Who and what drug" });
    await setting.getByRole("radio", { name: "the second, after the clock went back" }).check();
    await setting.getByText("Sun 25 Oct 2026 01:30 (UTC+00:00)").first().waitFor();
    await expectSound(page);
    await page.context().close();
  });
});

describe("mistakes in an order", () => {
  test("every fault of the form is listed, leads to its field, and nothing is lost", async () => {
    const { page } = await openFilled("Order with faults");
    await page.getByRole("button", { name: "Add an order" }).click();
    const form = page.getByRole("form", { name: "New order" });
    await form.getByRole("radio", { name: "every so many hours" }).check();
    await field(form, "Amount").fill("1,000");
    await field(form, "Interval").fill("0");
    await field(form, "From").fill("yesterday");
    await form.getByRole("button", { name: "Apply" }).click();
    const problems = form.getByRole("alert");
    await problems.waitFor();
    expect(await problems.getByRole("link").count()).toBeGreaterThanOrEqual(4);
    expect(await field(form, "Amount").inputValue()).toBe("1,000");
    await problems.getByRole("link").first().click();
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe("INPUT");
    await expectSound(page);
    await page.context().close();
  });

  test("a pump log is read from a file, and refused with its line where it has a gap", async () => {
    const { page } = await openFilled("Pump log");
    await page.getByRole("button", { name: "Add an order" }).click();
    const form = page.getByRole("form", { name: "New order" });
    await form.getByRole("radio", { name: "pump log" }).check();
    const file = (text: string) => ({ name: "pump.csv", mimeType: "text/csv", buffer: Buffer.from(text) });
    await form.getByLabel("Or read it from a CSV file").setInputFiles(file("time,rate\r\n0,50\r\n3.5,\r\n8,0\r\n"));
    await expect.poll(() => field(form, "Pump log").inputValue()).toContain("3.5");
    await form.getByRole("button", { name: "Apply" }).click();
    await form
      .getByText(/line 3: has no rate: the log has a gap here/)
      .first()
      .waitFor();
    await form.getByLabel("Or read it from a CSV file").setInputFiles(file("time,rate\r\n0,50\r\n3.5,20\r\n8,0\r\n"));
    await expect.poll(() => field(form, "Pump log").inputValue()).toContain("3.5,20");
    await form.getByRole("button", { name: "Apply" }).click();
    await form.waitFor({ state: "detached" });
    await curveDrawn(page);
    await page.context().close();
  });

  test("clock times with unequal amounts, until a time, are given as said", async () => {
    const { page } = await openFilled("Clock times");
    await page.getByRole("button", { name: "Add an order" }).click();
    const form = page.getByRole("form", { name: "New order" });
    await form.getByRole("radio", { name: "bolus" }).check();
    await field(form, "Amount").fill("300");
    await form.getByRole("radio", { name: "at clock times of the day" }).check();
    await field(form, "Clock time 1").fill("08:00");
    if ((await form.getByRole("textbox", { name: "Clock time 2" }).count()) === 0)
      await form.getByRole("button", { name: "One more clock time" }).click();
    await field(form, "Clock time 2").fill("20:00");
    await form.getByRole("textbox", { name: "Amount then, where it differs" }).nth(1).fill("450");
    await form.getByRole("radio", { name: "a time", exact: true }).check();
    await field(form, "Until").fill("2026-03-03 20:00");
    await form.getByRole("button", { name: "Apply" }).click();
    await form.waitFor({ state: "detached" });
    const rows = await page.getByRole("button", { name: /^Record or change/ }).count();
    expect(rows).toBe(3);
    await page.context().close();
  });
});
