import type { Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { expectSound, openPage, twoLooks } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, curveDrawn, field, fillSetting, levelIn, makeCase, save, tableText } from "./steps.ts";

const program = runningProgram();

/** By hand: 500 mg over 1 h every 8 h, CL 5 L/h, V 40 L. */
const k = 0.125;
const firstPeak = 100 * (1 - Math.exp(-k));
const steadyPeak = firstPeak / (1 - Math.exp(-8 * k));

async function figure(page: Page, name: string): Promise<string[]> {
  const rows = await tableText(page.getByRole("table", { name: "Figures of the alternatives" }));
  const row = rows.find(([head]) => head?.startsWith(name));
  expect(row, name).toBeDefined();
  return row!;
}

describe("the main job", () => {
  test.for(twoLooks)(
    "three alternatives with a late dose and a dialysis session, from an empty case to a sheet, at $name",
    async ({ options }) => {
      const { page, faults } = await openPage(program(), options);
      await makeCase(page, "Invented case for the whole way");
      await fillSetting(page, {
        start: "2026-03-02 08:00",
        horizonH: "72",
        volumeL: "40",
        clearanceLPerH: "5",
        low: "5",
        high: "25",
      });
      await page.getByText("derived from V and CL: 0.125").first().waitFor();

      await page.getByRole("button", { name: "Add a change of elimination" }).click();
      const change = page.getByRole("form", { name: "New change of elimination" });
      await change.getByRole("radio", { name: /added/i }).check();
      await field(change, /clearance/i).fill("3.5");
      await field(change, "From").fill("2026-03-04 10:00");
      await field(change, "Until").fill("2026-03-04 14:00");
      await field(change, "Where it came from").fill("dialysis session, invented");
      await change.getByRole("button", { name: "Apply" }).click();
      await page.getByText(/3\.5\s*L\/h of clearance added from Wed 4 Mar 2026 10:00/).waitFor();

      await field(page, "Name of alternative A").fill("500 mg every 8 h");
      await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
      await curveDrawn(page);
      await page.getByRole("button", { name: "Add an alternative" }).click();
      await field(page, "Name of alternative B").fill("750 mg every 12 h after 1,000 mg");
      await addInfusion(page, { amountMg: "1000", durationH: "2", at: "2026-03-02 08:00" });
      await addInfusion(page, { amountMg: "750", durationH: "1.5", at: "2026-03-02 20:00", intervalH: "12" });
      await page.getByRole("button", { name: "Copy B" }).click();
      await field(page, "Name of alternative C").fill("C, without the loading dose");
      await page.getByRole("button", { name: "Delete order 1" }).click();

      await page.getByRole("radio", { name: /^A / }).check();
      await page.getByRole("button", { name: /Record or change dose 2, Mon 2 Mar 2026 16:00/ }).click();
      const dose = page.getByRole("form", { name: /dose 2/i });
      await dose.getByRole("radio", { name: "given otherwise" }).check();
      await field(dose, "Time").fill("2026-03-02 18:30");
      await field(dose, "Note on what was given").fill("late, invented");
      await dose.getByRole("button", { name: "Apply" }).click();
      await page.getByText("given otherwise: Mon 2 Mar 2026 18:30").waitFor();

      const first = await figure(page, "First peak");
      expect(levelIn(first[1]!)).toBeCloseTo(firstPeak, 2);
      expect(first[1]).toContain("Mon 2 Mar 2026 09:00");
      expect(levelIn((await figure(page, "Peak at steady state"))[1]!)).toBeCloseTo(steadyPeak, 2);
      expect(levelIn((await figure(page, "Average at steady state"))[1]!)).toBe(12.5);
      expect((await figure(page, "Amount per day")).slice(1)).toEqual([
        "1,500 mg per day",
        "1,500 mg per day",
        "1,500 mg per day",
      ]);

      await save(page, "first plan", 1);
      await expectSound(page);
      const link = page.locator("#saved-note").getByRole("link", { name: /^Sheet, A4/ });
      const sheet = await page.request.get((await link.getAttribute("href"))!);
      expect(sheet.headers()["content-type"]).toBe("application/pdf");
      expect((await sheet.body()).subarray(0, 5).toString()).toBe("%PDF-");
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );

  test("the page, the API and the stored revision say the same level", async () => {
    const { page } = await openPage(program());
    await makeCase(page, "Invented case for the API", "UTC");
    await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
    await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
    await curveDrawn(page);
    await field(page, "Time of the cursor").fill("2026-03-03 11:30");
    await page.keyboard.press("Enter");
    const readout = page.getByRole("table", { name: /Levels at the cursor/ });
    await page
      .getByText(/Tue 3 Mar 2026 11:30/)
      .first()
      .waitFor();
    const answer = await page.request.post("/api/predictions", {
      data: {
        parameters: { volumeL: 40, clearanceLPerH: 5 },
        doses: [0, 8, 16, 24, 32, 40].map((atH) => ({ kind: "infusion", atH, amountMg: 500, durationH: 1 })),
        horizonH: 48,
        sampleTimesH: [27.5],
      },
    });
    const { concentrationsMgPerL } = await answer.json();
    expect(levelIn(await readout.innerText())).toBeCloseTo(concentrationsMgPerL[0], 2);
    await page.context().close();
  });
});
