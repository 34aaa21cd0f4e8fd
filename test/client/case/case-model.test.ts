import { describe, expect, test } from "vitest";
import { withAlternative } from "../../../client/case/case-document.ts";
import { createCaseModel } from "../../../client/case/case-model.ts";
import { documentOfCase } from "../../../client/case/document-of-case.ts";
import { readSetting } from "../../../client/case/read-setting.ts";
import { inventedWholeCase, regimenId } from "./invented-case.ts";

function opened() {
  return createCaseModel(documentOfCase(inventedWholeCase()), readSetting);
}

const labelled = (label: string) => (document: ReturnType<typeof documentOfCase>) => ({ ...document, label });

describe("the case model", () => {
  test("undoes and does again, and says what", () => {
    const model = opened();
    model.change("label of the case", labelled("one"));
    model.change("label of the case", labelled("two"));
    model.undo();
    expect(model.document.value.label).toBe("one");
    expect(model.lastChange.value).toBe("Undone: label of the case");
    model.redo();
    expect(model.document.value.label).toBe("two");
    expect(model.canRedo.value).toBe(false);
    model.undo();
    model.undo();
    expect(model.document.value.label).toBe("Invented case");
    expect(model.canUndo.value).toBe(false);
  });

  test("a word being typed is one step, and what comes after it another", () => {
    const model = opened();
    for (const label of ["N", "Ne", "New"]) model.change("label of the case", labelled(label), "label");
    model.change("notes of the case", (document) => ({ ...document, notes: "n" }), "notes");
    model.undo();
    expect(model.document.value).toMatchObject({ label: "New", notes: "" });
    model.undo();
    expect(model.document.value.label).toBe("Invented case");
  });

  test("a change that changes nothing is no step", () => {
    const model = opened();
    model.change("nothing", (document) => withAlternative(document, "not there", (each) => each));
    expect(model.canUndo.value).toBe(false);
  });

  test("a fact from the server holds in every remembered step", () => {
    const model = opened();
    model.change("label of the case", labelled("one"));
    model.rewrite((document) => withAlternative(document, regimenId, (each) => ({ ...each, savedNumber: 7 })));
    model.undo();
    expect(model.document.value.alternatives[0]?.savedNumber).toBe(7);
  });

  test("an invalid field takes the setting away and leaves what is typed", () => {
    const model = opened();
    model.change("length of the plan", (document) => ({ ...document, form: { ...document.form, horizonH: "4,8" } }));
    expect(model.document.value.setting).toBeUndefined();
    expect(model.document.value.form.horizonH).toBe("4,8");
    expect(model.contents.value.size).toBe(0);
    model.undo();
    expect(model.contents.value.size).toBe(1);
  });

  test("what is computed with keeps its identity while nothing in it changes", () => {
    const model = opened();
    const before = model.contents.value.get(regimenId);
    model.change("notes of the case", (document) => ({ ...document, notes: "n" }));
    expect(model.contents.value.get(regimenId)).toBe(before);
  });
});
