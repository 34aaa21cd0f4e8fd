import { describe, expect, test } from "vitest";
import { documentOfCase } from "../../../client/case/document-of-case.ts";
import { readUnsaved } from "../../../client/keeping/unsaved-form.ts";
import { writeUnsaved } from "../../../client/keeping/write-unsaved.ts";
import { inventedWholeCase } from "../case/invented-case.ts";

const document = documentOfCase(inventedWholeCase());
const keptAt = new Date("2026-03-02T09:00:00Z");
const work = {
  document: { ...document, form: { ...document.form, horizonH: "4,8" } },
  drafts: { "order:x:new": { amount: "77," } },
  baseVersion: 3,
};

describe("unsaved work", () => {
  test("comes back as it was typed, invalid fields and open editors included", () => {
    expect(readUnsaved(writeUnsaved(work, keptAt))).toEqual({
      document: { ...work.document, setting: undefined },
      drafts: work.drafts,
      baseVersion: 3,
      keptAt: "2026-03-02T09:00:00.000Z",
    });
  });

  test.for([
    { what: "cut short", damage: (text: string) => text.slice(0, -20) },
    {
      what: "of another version",
      damage: (text: string) => text.replace('"formatVersion":1,"keptAt"', '"formatVersion":2,"keptAt"'),
    },
    { what: "of another program", damage: (text: string) => text.replace("ebbline-unsaved", "other") },
    {
      what: "with a dose that the contract refuses",
      damage: (text: string) => text.replace('"amountMg":500', '"amountMg":"500"'),
    },
    { what: "with a field nobody knows", damage: (text: string) => text.replace('"horizonH"', '"length"') },
  ])("is refused when it is $what", ({ damage }) => {
    const text = writeUnsaved(work, keptAt);
    expect(damage(text)).not.toBe(text);
    expect(readUnsaved(damage(text))).toBeUndefined();
  });
});
