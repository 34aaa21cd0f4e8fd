import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { CaseFile } from "../../shared/contract/case.ts";
import { expectSound, looks, openPage } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { addInfusion, fillSetting, makeCase, openDemo, save } from "./steps.ts";

const program = runningProgram();

describe("cases", () => {
  test.for(looks)("the list holds the invented demo and is sound at $name", async ({ options }) => {
    const { page, faults } = await openPage(program(), options);
    await page.goto("/");
    await page.getByRole("link", { name: /^Demo \(invented\)/ }).waitFor();
    expect(await page.getByRole("region", { name: "Cautions" }).innerText()).toContain("It is not an order");
    await expectSound(page);
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("a case is made, found again, archived and brought back", async () => {
    const { page, faults } = await openPage(program());
    await makeCase(page, "Invented kidney case");
    await page.getByRole("link", { name: "Ebbline", exact: true }).click();
    await page.getByRole("textbox", { name: "Find by label or notes" }).fill("kidney");
    await expect.poll(() => page.locator(".case-list li").count()).toBe(1);
    await page.getByRole("button", { name: /^Archive Invented kidney case/ }).click();
    await page.getByText("No case has “kidney”").waitFor();
    await page.getByRole("radio", { name: "archived" }).check();
    await page.getByRole("button", { name: /^Bring back Invented kidney case/ }).click();
    await page.getByRole("radio", { name: "in use" }).check();
    await page.getByRole("link", { name: "Invented kidney case", exact: true }).waitFor();
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test("a case without label or with an unknown zone is refused beside the field, and what was typed stays", async () => {
    const { page } = await openPage(program());
    await page.goto("/");
    await page.getByRole("combobox", { name: "Time zone" }).fill("Mars/Olympus");
    await page.getByRole("textbox", { name: "Notes", exact: true }).fill("kept");
    await page.getByRole("button", { name: "Make the case" }).click();
    await page.getByText("Label is empty; give the case a label without names").waitFor();
    await page.getByText(/Time zone must be an IANA name such as Europe\/London, got Mars\/Olympus/).waitFor();
    await expectSound(page);
    await page.reload();
    expect(await page.getByRole("textbox", { name: "Notes", exact: true }).inputValue()).toBe("kept");
    await page.context().close();
  });

  test("a case goes out as a file and comes in again, its hashes checked", async () => {
    const { page } = await openPage(program());
    await makeCase(page, "Case for a file");
    await fillSetting(page, { start: "2026-03-02 08:00", horizonH: "48", volumeL: "40", clearanceLPerH: "5" });
    await addInfusion(page, { amountMg: "500", durationH: "1", at: "2026-03-02 08:00", intervalH: "8" });
    await save(page, "first plan", 1);
    await page.goto("/");
    const download = page.waitForEvent("download");
    await page.getByRole("link", { name: /^JSON file of Case for a file/ }).click();
    const path = await (await download).path();
    const text = readFileSync(path, "utf8");
    const file = CaseFile.parse(JSON.parse(text));
    expect(file.regimens[0]?.revisions[0]?.reason).toBe("first plan");

    await page.getByLabel("Case file").setInputFiles(path);
    await page.getByText("saved as revision 1").waitFor();
    await page.goto("/");
    await expect.poll(() => page.getByRole("link", { name: "Case for a file", exact: true }).count()).toBe(2);

    const refused = [
      { name: "changed.json", text: text.replace('"first plan"', '"other plan"'), says: /hash/i },
      {
        name: "later.json",
        text: text
          .replace('"formatVersion":1', '"formatVersion":2')
          .replace('"formatVersion": 1', '"formatVersion": 2'),
        says: /must be 1/,
      },
      { name: "broken.json", text: text.slice(0, -20), says: /must be a JSON file/ },
    ];
    for (const { name, text: changed, says } of refused) {
      await page
        .getByLabel("Case file")
        .setInputFiles({ name, mimeType: "application/json", buffer: Buffer.from(changed) });
      await page.getByRole("alert").filter({ hasText: says }).waitFor();
    }
    await page.getByLabel("Case file").setInputFiles({
      name: "latin1.json",
      mimeType: "application/json",
      buffer: Buffer.from('{"a":"\xe9"}', "latin1"),
    });
    await page.getByRole("alert").filter({ hasText: "must be encoded in UTF-8" }).waitFor();
    await page.context().close();
  });

  test("an address that leads nowhere says so", async () => {
    const { page } = await openPage(program());
    await page.goto("/cases/00000000-0000-4000-8000-000000000000");
    await page.getByRole("alert").waitFor();
    await expectSound(page);
    await page.goto("/cases/elsewhere");
    await page.getByRole("heading", { name: "There is no such page" }).waitFor();
    await page.context().close();
  });

  test.for(looks)("the demo case is sound at $name", async ({ options }) => {
    const { page, faults } = await openPage(program(), options);
    await openDemo(page);
    await expectSound(page);
    expect(faults).toEqual([]);
    await page.context().close();
  });
});
