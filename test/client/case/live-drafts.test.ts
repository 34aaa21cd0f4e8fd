import { describe, expect, test } from "vitest";
import { documentOfCase } from "../../../client/case/document-of-case.ts";
import { liveDrafts } from "../../../client/case/live-drafts.ts";
import { inventedWholeCase, regimenId } from "./invented-case.ts";

const document = documentOfCase(inventedWholeCase());

describe("liveDrafts", () => {
  test.for([
    { name: `order:${regimenId}:new`, live: true },
    { name: `order:${regimenId}:o1`, live: true },
    { name: `order:${regimenId}:gone`, live: false },
    { name: "order:another:new", live: false },
    { name: `dose:${regimenId}:o1#3`, live: true },
    { name: `dose:${regimenId}:gone#3`, live: false },
    { name: `dose:${regimenId}:extra:gone`, live: false },
    { name: `save:${regimenId}`, live: true },
    { name: "save:another", live: false },
    { name: "change:new", live: true },
    { name: "change:gone", live: false },
    { name: "time-zone", live: true },
  ])("$name counts as unsaved work: $live", ({ name, live }) => {
    expect(Object.keys(liveDrafts({ [name]: { amount: "5" } }, document))).toEqual(live ? [name] : []);
  });
});
