import { describe, expect, test } from "vitest";
import { expectSound, openPage, twoLooks } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, makeCase, tableText } from "./steps.ts";

const program = runningProgram();

describe("what was given", () => {
  test.for(twoLooks)(
    "as planned, at another time and amount, omitted and extra: each is recorded and counted, at $name",
    async ({ options }) => {
      const { page, faults } = await openPage(program(), options);
      await makeCase(page, "What was given", "UTC");
      await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
      await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
      await curveDrawn(page);
      const record = async (dose: number, choice: string, fill: Record<string, string> = {}) => {
        await page.getByRole("button", { name: new RegExp(`^Record or change dose ${dose},`) }).click();
        const form = page.getByRole("form", { name: new RegExp(`dose ${dose}`, "i") });
        await form.getByRole("radio", { name: choice, exact: true }).check();
        for (const [name, text] of Object.entries(fill)) await field(form, new RegExp(`^${name}`)).fill(text);
        await form.getByRole("button", { name: "Apply" }).click();
        await form.waitFor({ state: "detached" });
      };
      await record(1, "given as planned");
      await record(2, "given otherwise", { Time: "2026-03-02 18:30", Amount: "400", "Infusion duration": "2" });
      await record(3, "omitted");
      await page.getByRole("button", { name: "Record an extra dose" }).click();
      const extra = page.getByRole("form", { name: /extra dose/i });
      await field(extra, "Given at").fill("2026-03-03 10:00");
      await extra.getByRole("radio", { name: "bolus" }).check();
      await field(extra, "Amount").fill("100");
      await extra.getByRole("button", { name: "Apply" }).click();
      await extra.waitFor({ state: "detached" });

      const text = await page.getByRole("region", { name: /Doses/ }).first().innerText();
      for (const words of ["given as planned", "Mon 2 Mar 2026 18:30", "omitted", "not planned"])
        expect(text.replaceAll("\u00a0", " ")).toContain(words);
      // 500 + 400 + 3 x 500 + 100: the omitted dose is not in it.
      const rows = await tableText(page.getByRole("table", { name: "Figures of the alternatives" }));
      await expect
        .poll(
          async () =>
            (await tableText(page.getByRole("table", { name: "Figures of the alternatives" }))).find(([name]) =>
              name!.startsWith("Amount in the plan"),
            )![1],
        )
        .toBe("2,500 mg");
      expect(rows.length).toBeGreaterThan(20);
      await page.getByRole("columnheader", { name: "As planned (thin line)" }).waitFor();
      const folded = page.getByRole("region", { name: "Cautions" }).getByRole("button", { expanded: false });
      if ((await folded.count()) > 0) await folded.click();
      expect(await page.getByRole("region", { name: "Cautions" }).innerText()).toContain(
        "Not everything was given as planned",
      );
      await expectSound(page);
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );
});
