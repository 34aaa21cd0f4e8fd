import { describe, expect, test } from "vitest";
import { withCopy, withNewAlternative, withoutAlternative } from "../../../client/alternatives/alternative-edits.ts";
import { letterOf } from "../../../client/case/case-document.ts";
import { documentOfCase } from "../../../client/case/document-of-case.ts";
import { inventedWholeCase, regimenId } from "../case/invented-case.ts";

const document = documentOfCase(inventedWholeCase());

describe("alternatives", () => {
  test("a copy has the orders and is a new alternative that nobody saved", () => {
    const copied = withCopy(document, regimenId, "copy");
    const [source, copy] = copied.alternatives;
    expect(copy?.schedule).toBe(source?.schedule);
    expect(copy).toMatchObject({ key: "copy", label: "Copy of Every 8 h", savedNumber: 0, cautionReasons: [] });
    expect(copy).not.toHaveProperty("regimenId");
    expect(letterOf(copied, "copy")).toBe("B");
  });

  test("there are six letters and no seventh", () => {
    let full = document;
    for (const key of ["b", "c", "d", "e", "f"]) full = withNewAlternative(full, key);
    expect(full.alternatives).toHaveLength(6);
    expect(new Set(full.alternatives.map(({ label }) => label)).size).toBe(6);
    expect(withNewAlternative(full, "g")).toBe(full);
    expect(withCopy(full, "b", "g")).toBe(full);
  });

  test("the last alternative stays", () => {
    expect(withoutAlternative(document, regimenId)).toBe(document);
  });
});
