import { describe, expect, test } from "vitest";
import { expectSound, openPage } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, makeCase } from "./steps.ts";

const program = runningProgram();

describe("unsaved work", () => {
  test("is offered back after the page was closed, wrong fields included", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await makeCase(page, "Closed in the middle");
    await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
    await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
    await field(page, "Half-life").fill("0,5");
    await page.keyboard.press("Tab");
    await page
      .getByText(/must be written without a comma/)
      .first()
      .waitFor();
    const address = page.url();
    const again = await page.context().newPage();
    await page.close({ runBeforeUnload: false });
    await again.goto(address);
    await again.getByRole("heading", { name: /^Unsaved work on/ }).waitFor();
    await expectSound(again);
    await again.getByRole("button", { name: "Take it up" }).click();
    expect(await field(again, "Half-life").inputValue()).toBe("0,5");
    await again
      .getByText(/Order 1:/)
      .first()
      .waitFor();
    await field(again, "Half-life").fill("");
    await curveDrawn(again);
    await again.reload();
    await again.getByRole("button", { name: "Discard it and open the case as saved" }).click();
    expect(await field(again, /^Volume of distribution/).inputValue()).toBe("");
    await again.context().close();
  });

  test("that cannot be read is never guessed, and can be taken away as it is", async () => {
    const { page } = await openPage(program());
    await makeCase(page, "Damaged");
    await field(page, "Length of the plan").fill("48");
    await page.reload();
    await page.getByRole("heading", { name: /^Unsaved work on/ }).waitFor();
    await page.evaluate(() => {
      for (const name of Object.keys(localStorage))
        if (localStorage.getItem(name)?.includes("48")) localStorage.setItem(name, '{"from":"another release"}');
    });
    await page.reload();
    await page.getByText("it cannot be taken up. Nothing of it is guessed.", { exact: false }).waitFor();
    await page.getByRole("link", { name: "Download it as it is" }).waitFor();
    await page.context().close();
  });

  test("outlives a server that is stopped and started again", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await makeCase(page, "Server away");
    await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
    await program().server.restart();
    await page.getByRole("button", { name: "Save the case's details" }).click();
    await page.getByText("Label, notes, time zone, kinetics and plan are as saved.").waitFor();
    await page.context().close();
  });
});
