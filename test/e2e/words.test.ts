import { describe, expect, test } from "vitest";
import { findWritingFaults } from "../writing-rules.ts";
import { openPage } from "./browser.ts";
import { runningProgram } from "./program.ts";
import { openDemo } from "./steps.ts";

const program = runningProgram();

describe("the words on the screen", () => {
  test("keep the medication-safety writing rules on every page, everything opened", async () => {
    const { page } = await openPage(program(), { viewport: { width: 1400, height: 900 } });
    await page.goto("/");
    await page.getByRole("link", { name: /^Demo/ }).waitFor();
    expect(findWritingFaults(await page.locator("body").innerText())).toEqual([]);
    await openDemo(page);
    // One at a time: opening one may bring another into the page.
    for (const closed = page.locator("details:not([open]) > summary"); (await closed.count()) > 0; )
      await closed.first().click();
    await page.getByText("A = 1 ÷ (1 − e^(−k × P))").waitFor();
    await page.getByRole("button", { name: "Compare any two revisions" }).click();
    await page.getByRole("heading", { name: "Two revisions compared" }).waitFor();
    expect(findWritingFaults(withoutHashes(await page.locator("body").innerText()))).toEqual([]);
    const labels = await page
      .locator("[aria-label], [aria-valuetext], [title]")
      .evaluateAll((elements) =>
        elements.flatMap((element) =>
          ["aria-label", "aria-valuetext", "title"].map((name) => element.getAttribute(name) ?? ""),
        ),
      );
    expect(findWritingFaults(labels.join("\n"))).toEqual([]);
    await page.goto("/api/docs");
    expect(await page.locator("body").innerText()).toContain("It is not an order");
    await page.context().close();
  });
});

/** Hexadecimal digits are no doses. */
function withoutHashes(text: string): string {
  return text.replace(/\b[0-9a-f]{12}\b/g, "");
}
