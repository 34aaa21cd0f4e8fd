import { createHash } from "node:crypto";
import { getDocument } from "pdfjs-dist/legacy/build/pdf.mjs";
import { describe, expect, test } from "vitest";
import { writeSheet } from "../../../server/sheet/sheet.ts";
import { standingCaution } from "../../../shared/cautions/standing.ts";
import { Revision } from "../../../shared/contract/case.ts";
import { workedArithmetic } from "../../../shared/figures/arithmetic/worked-arithmetic.ts";
import { figureGroups } from "../../../shared/figures/figure-rows.ts";
import { figuresOf } from "../../../shared/figures/figures.ts";
import { sayFigure } from "../../../shared/figures/say-figure.ts";
import { compareWithSecondOpinion } from "../../../shared/kinetics/second-opinion.ts";
import { courseOfContent } from "../../../shared/schedule/course-of-content.ts";
import { inventedContent, stated } from "../../invented-content.ts";
import { findWritingFaults } from "../../writing-rules.ts";

const typed = { kind: "typed", note: "from the ward's chart" } as const;
const content = inventedContent({
  timeZone: "Europe/London",
  setting: {
    plan: { start: "2026-03-28T08:00:00Z", horizonH: 72 },
    kinetics: { volumeL: stated(0.15), halfLifeH: stated(6) },
    rangeMgPerL: { low: 500, high: 2_000 },
    eliminationChanges: [
      {
        id: "d",
        kind: "added-clearance",
        from: "2026-03-29T14:00:00+01:00",
        until: "2026-03-29T18:00:00+01:00",
        addedClearanceLPerH: 0.015,
        origin: typed,
      },
    ],
  },
  schedule: {
    orders: [
      {
        id: "o1",
        give: { kind: "infusion", amountMg: 150, durationH: 1 },
        when: { kind: "every", from: "2026-03-28T08:00:00Z", intervalH: 12, end: { kind: "open" } },
      },
    ],
    records: [{ orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: "2026-03-28T22:30:00Z" }, note: "late" }],
  },
  cautionReasons: [
    {
      code: "unusual-value",
      about: "/setting/kinetics/volumeL",
      text: "Volume of distribution 0.15\u00a0L is below the usual 0.2 to 2,000\u00a0L. Check the decimal point and the unit.",
      reason: "an invented volume, so that a caution stops",
    },
  ],
});

const revision = Revision.parse({
  id: "6f1c7a52-6f3e-4b46-9f0c-0d8b1c1f2a01",
  caseId: "6f1c7a52-6f3e-4b46-9f0c-0d8b1c1f2a02",
  regimenId: "6f1c7a52-6f3e-4b46-9f0c-0d8b1c1f2a03",
  number: 3,
  createdAt: "2026-03-28T09:12:00Z",
  reason: "smaller doses ≥ 2 days, β",
  preparedBy: "Invented Person",
  content,
  contentHash: createHash("sha256").update("an invented content").digest("hex"),
  secondOpinion: compareWithSecondOpinion(courseOfContent(content, "given").course),
});

type Read = Awaited<ReturnType<typeof readPdf>>;

async function readPdf(bytes: Uint8Array) {
  const document = await getDocument({ data: bytes.slice(), verbosity: 0 }).promise;
  const pages: string[] = [];
  const pieces: string[] = [];
  const tags = new Set<string>();
  for (let number = 1; number <= document.numPages; number++) {
    const page = await document.getPage(number);
    const { items } = await page.getTextContent();
    const written = items.map((item) => ("str" in item ? item.str : ""));
    pages.push(written.join(" "));
    pieces.push(...written);
    collectTags(await page.getStructTree(), tags);
  }
  return {
    pages,
    pieces,
    tags,
    text: squeezed(pages.join(" ")),
    metadata: await document.getMetadata(),
    marked: await document.getMarkInfo(),
  };
}

function collectTags(node: unknown, into: Set<string>): void {
  if (typeof node !== "object" || node === null) return;
  if ("role" in node && typeof node.role === "string") into.add(node.role);
  if ("children" in node && Array.isArray(node.children)) for (const child of node.children) collectTags(child, into);
}

/** Line breaks within a cell, no-break spaces and word joiners are the page's, not the text's. */
function squeezed(text: string): string {
  return text.replace(/[\s\u00a0\u2060]+/g, "");
}

const sheets = new Map<string, Promise<Read>>();
const sheetOn = (paper: "A4" | "Letter") => {
  if (!sheets.has(paper)) sheets.set(paper, writeSheet(revision, { paper }).then(readPdf));
  return sheets.get(paper)!;
};

describe.for(["A4", "Letter"] as const)("writeSheet on %s", (paper) => {
  test("begins with the caution", async () => {
    const { text } = await sheetOn(paper);
    expect(text.startsWith(squeezed(`Caution. ${standingCaution.text}`))).toBe(true);
  });

  test("names the case, the revision, its author, its hash and its reason on paper", async () => {
    const { text } = await sheetOn(paper);
    for (const words of [
      "Invented case",
      "Every 8 h",
      "Invented Person",
      revision.contentHash,
      "smaller doses ≥ 2 days, β",
      "Sat 28 Mar 2026 09:12 (Europe/London)",
    ])
      expect(text).toContain(squeezed(words));
  });

  test("prints every input with its unit and origin", async () => {
    const { text } = await sheetOn(paper);
    for (const words of [
      "Volume of distribution 0.15 L typed: invented for a test",
      "Desired range 500 mg/L to 2,000 mg/L",
      "0.015 L/h added from Sun 29 Mar 2026 14:00 to Sun 29 Mar 2026 18:00 (4 h)",
      "derived from volume of distribution and half-life",
    ])
      expect(text).toContain(squeezed(words));
  });

  test("dates every dose and says what became of it", async () => {
    const { text } = await sheetOn(paper);
    expect(text).toContain(
      squeezed(
        "2 Sat 28 Mar 2026 22:30 14.5 h 150 mg over 1 h (150 mg per hour) given otherwise; planned Sat 28 Mar 2026 20:00",
      ),
    );
    expect(text).toContain(squeezed("3 Sun 29 Mar 2026 09:00 24 h 150 mg over 1 h"));
  });

  test("prints every figure that the program has", async () => {
    const { text } = await sheetOn(paper);
    const figures = figuresOf(content);
    for (const { rows } of figureGroups)
      for (const { name, label } of rows) expect(text).toContain(squeezed(`${label} ${sayFigure(figures[name])}`));
  });

  test("prints every line of the arithmetic", async () => {
    const { text } = await sheetOn(paper);
    for (const { title, steps } of workedArithmetic(content)) {
      expect(text).toContain(squeezed(title));
      for (const { formula, substituted, result } of steps)
        expect(text).toContain(squeezed(`${formula} = ${substituted} = ${result}`));
    }
  });

  test("lists the cautions with the reasons given", async () => {
    const { text } = await sheetOn(paper);
    expect(text).toContain(
      squeezed("Check the decimal point and the unit. Reason given: an invented volume, so that a caution stops"),
    );
    expect(text).toContain(squeezed("Note: Not everything was given as planned."));
  });

  test("leaves room for an independent check", async () => {
    const { text } = await sheetOn(paper);
    for (const words of [
      "Checker's own result",
      "Prepared by Invented Person",
      "Independently checked by",
      "Date and 24-hour time",
    ])
      expect(text).toContain(squeezed(words));
  });

  test("numbers its pages, all of them written on", async () => {
    const { pages } = await sheetOn(paper);
    pages.forEach((page, index) => {
      expect(squeezed(page)).toContain(squeezed(`Page ${index + 1} of ${pages.length}`));
      expect(page.length).toBeGreaterThan(300);
    });
  });

  test("ends no line within a unit", async () => {
    const { pieces } = await sheetOn(paper);
    expect(pieces.filter((piece) => /\w\/\u2060?$/.test(piece.trim()))).toEqual([]);
  });

  test("keeps the medication-safety writing rules", async () => {
    const { pages } = await sheetOn(paper);
    for (const page of pages)
      expect(
        findWritingFaults(
          page
            .replaceAll(revision.contentHash.slice(0, 32), "")
            .replaceAll(revision.contentHash.slice(32), "")
            .replaceAll(revision.contentHash.slice(0, 12), ""),
        ),
      ).toEqual([]);
  });

  test("is tagged, titled and in a language", async () => {
    const { tags, metadata, marked } = await sheetOn(paper);
    expect(marked).toMatchObject({ Marked: true });
    expect(metadata.info).toMatchObject({ Title: "Ebbline dosing plan, revision 3", Language: "en-GB" });
    for (const tag of ["H1", "H2", "H3", "P", "Table", "TR", "TH", "TD", "Figure"]) expect(tags).toContain(tag);
  });
});

describe("writeSheet", () => {
  test("asks a checker only for what the plan has", async () => {
    const order = { ...content.schedule.orders[0]!, when: { kind: "once" as const, at: content.setting.plan.start } };
    const once = { ...content, schedule: { ...content.schedule, orders: [order], records: [] } };
    const { pages } = await readPdf(await writeSheet({ ...revision, content: once }, { paper: "A4" }));
    const asked = squeezed(pages.at(-1)!);
    expect(asked).toContain(squeezed("Highest level in the plan (mg/L)"));
    expect(asked).not.toContain(squeezed("steady state"));
    expect((await sheetOn("A4")).text).toContain(squeezed("Peak at steady state (mg/L)"));
  });

  test("gives the same bytes for the same revision, whatever the machine's zone", async () => {
    const hashOf = async () =>
      createHash("sha256")
        .update(await writeSheet(revision, { paper: "A4" }))
        .digest("hex");
    const before = process.env["TZ"];
    process.env["TZ"] = "America/New_York";
    const there = await hashOf();
    process.env["TZ"] = before;
    expect(await hashOf()).toBe(there);
  });

  test("names a sign that its font lacks instead of leaving a gap", async () => {
    const { text } = await readPdf(await writeSheet({ ...revision, reason: "因 and\ttab" }, { paper: "A4" }));
    expect(text).toContain(squeezed("[U+56E0] and tab"));
  });
});
