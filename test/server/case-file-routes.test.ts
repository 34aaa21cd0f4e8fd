import request from "supertest";
import { describe, expect, test } from "vitest";
import { contentHashOf } from "../../db/seal.ts";
import { RevisionAnswer } from "../../shared/contract/answers.ts";
import { CaseFile } from "../../shared/contract/case.ts";
import { makeApp, makeRevision, write } from "./support/make-app.ts";
import { draft } from "./support/samples.ts";

async function download(app: Parameters<typeof makeRevision>[0]): Promise<CaseFile> {
  const { caseId, regimenId } = await makeRevision(app);
  await write(app, "post", `/api/cases/${caseId}/regimens/${regimenId}/revisions`, {
    ...draft,
    basedOnNumber: 1,
    reason: "Second plan",
  }).expect(201);
  const { body, headers } = await request(app).get(`/api/cases/${caseId}/file`).expect(200);
  expect(headers["content-disposition"]).toBe(`attachment; filename="ebbline-case-${caseId.slice(0, 8)}.json"`);
  return CaseFile.parse(body);
}

describe("a case file", () => {
  test("brings a case back as a new one with the same hashes", async () => {
    const file = await download(makeApp().app);
    const { app } = makeApp();
    const { body: made } = await write(app, "post", "/api/case-files", file).expect(201);
    const { body } = await request(app).get(`/api/cases/${made.id}`).expect(200);
    expect(body.regimens[0].latestRevisionNumber).toBe(2);
    const { body: list } = await request(app)
      .get(`/api/cases/${made.id}/regimens/${body.regimens[0].id}/revisions`)
      .expect(200);
    const hashes = list.revisions.map((revision: unknown) => RevisionAnswer.parse(revision).contentHash);
    expect(hashes.reverse()).toEqual(file.regimens[0]!.revisions.map(({ contentHash }) => contentHash));
    const { body: again } = await request(app).get(`/api/cases/${made.id}/file`).expect(200);
    expect({ ...again, exportedAt: "" }).toEqual({ ...file, exportedAt: "" });
  });

  test.for([
    { name: "another version", change: { formatVersion: 2, somethingNew: true }, pointer: "#/formatVersion" },
    { name: "another format", change: { format: "other" }, pointer: "#/format" },
  ])("of $name is refused clearly", async ({ change, pointer }) => {
    const { app } = makeApp();
    const file = await download(app);
    const { body } = await write(app, "post", "/api/case-files", { ...file, ...change }).expect(422);
    expect(body.type).toBe("/problems/case-file");
    expect(body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([pointer]);
  });

  test("whose revision was changed is refused, naming it, and nothing of it is kept", async () => {
    const { app } = makeApp();
    const file = await download(app);
    const before = (await request(app).get("/api/cases")).body.cases.length;
    const changed = structuredClone(file);
    const [order] = changed.regimens[0]!.revisions[1]!.content.schedule.orders;
    if (order?.give.kind !== "infusion") throw new Error("the sample has an infusion");
    order.give.amountMg = 401;
    const { body } = await write(app, "post", "/api/case-files", changed).expect(422);
    expect(body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      "#/regimens/0/revisions/1/contentHash",
    ]);
    expect((await request(app).get("/api/cases")).body.cases).toHaveLength(before);
  });

  test("with a gap in its numbers is refused", async () => {
    const { app } = makeApp();
    const file = await download(app);
    const gap = { ...file, regimens: [{ ...file.regimens[0]!, revisions: [file.regimens[0]!.revisions[1]!] }] };
    const { body } = await write(app, "post", "/api/case-files", gap).expect(422);
    expect(body.errors[0]).toEqual({
      pointer: "#/regimens/0/revisions/0/number",
      detail: "must be 1, got 2: revisions are numbered from 1 without a gap",
    });
  });

  test("with a stop that nobody answered is refused even when its hash is right", async () => {
    const { app } = makeApp();
    const file = await download(app);
    const forged = structuredClone(file.regimens[0]!.revisions[0]!);
    const [order] = forged.content.schedule.orders;
    if (order?.give.kind !== "infusion") throw new Error("the sample has an infusion");
    order.give.amountMg = 30_000;
    forged.contentHash = contentHashOf(forged);
    const { body } = await write(app, "post", "/api/case-files", {
      ...file,
      regimens: [{ label: "x", retired: false, revisions: [forged] }],
    }).expect(422);
    expect(body.type).toBe("/problems/unanswered-cautions");
  });

  test("with seven alternatives in use is refused", async () => {
    const { app } = makeApp();
    const file = await download(app);
    const regimens = Array.from({ length: 7 }, (_, index) => ({ label: `A${index}`, retired: false, revisions: [] }));
    const { body } = await write(app, "post", "/api/case-files", { ...file, regimens }).expect(422);
    expect(body.errors[0].pointer).toBe("#/regimens");
  });

  test("may be larger than other bodies", async () => {
    const { app } = makeApp();
    const file = await download(app);
    const one = file.regimens[0]!.revisions[0]!;
    // Retired alternatives with the same revision over and over: about 3 MB.
    const regimens = Array.from({ length: 100 }, () => ({
      label: "old",
      retired: true,
      revisions: [1, 2, 3, 4, 5, 6, 7, 8].map((number) => ({
        ...one,
        number,
        reason: "x".repeat(2_000),
        contentHash: "",
      })),
    }));
    for (const { revisions } of regimens)
      for (const revision of revisions) revision.contentHash = contentHashOf(revision);
    const big = { ...file, regimens };
    expect(JSON.stringify(big).length).toBeGreaterThan(2 * 1024 * 1024);
    await write(app, "post", "/api/case-files", big).expect(201);
  });
});
