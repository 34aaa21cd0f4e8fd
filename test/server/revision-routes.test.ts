import { createHash, randomUUID } from "node:crypto";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { canonicalJson } from "../../db/seal.ts";
import { RevisionAnswer } from "../../shared/contract/answers.ts";
import { Revision } from "../../shared/contract/case.ts";
import { makeApp, makeRegimen, makeRevision, now, write } from "./support/make-app.ts";
import { content, draft, setting } from "./support/samples.ts";

const path = ({ id, caseId }: { id: string; caseId: string }) => `/api/cases/${caseId}/regimens/${id}/revisions`;

/** 30,000 mg at once is above what the limits call usual: a caution that stops. */
const hugeDose = {
  ...content,
  schedule: {
    orders: [{ ...content.schedule.orders[0]!, give: { kind: "infusion" as const, amountMg: 30_000, durationH: 1 } }],
  },
};

describe("POST .../revisions", () => {
  test("saves a numbered revision with the hash of what it says and a second opinion", async () => {
    const { app } = makeApp();
    const revision = RevisionAnswer.parse(await makeRevision(app));
    const { number, createdAt, reason, preparedBy } = revision;
    expect({ number, createdAt, reason, preparedBy }).toEqual({
      number: 1,
      createdAt: now,
      reason: "First plan",
      preparedBy: "A. Pharmacist",
    });
    // The definition of the contract, worked out anew: SHA-256 over the RFC 8785 form.
    const said = canonicalJson({ content: revision.content, createdAt, number, preparedBy, reason });
    expect(revision.contentHash).toBe(createHash("sha256").update(said).digest("hex"));
    expect(revision.secondOpinion.points).toBeGreaterThan(10);
    // 1e-6 is what is allowed; both roads are good to about 1e-12.
    expect(revision.secondOpinion.relative).toBeLessThan(1e-9);
    expect((await request(app).get(`/api/revisions/${revision.id}`).expect(200)).body).toEqual(revision);
  });

  test("refuses one that is based on an older revision than the newest", async () => {
    const { app } = makeApp();
    const regimen = await makeRegimen(app);
    await write(app, "post", path(regimen), draft).expect(201);
    const { body } = await write(app, "post", path(regimen), { ...draft, reason: "Somebody else" }).expect(409);
    expect(body).toMatchObject({
      type: "/problems/stale",
      detail: "the regimen has changed: you had seen 0, the newest is 1",
    });
    await write(app, "post", path(regimen), { ...draft, basedOnNumber: 2 }).expect(409);
    await write(app, "post", path(regimen), { ...draft, basedOnNumber: 1 }).expect(201);
  });

  test("refuses cautions that stop until each has a reason, naming each", async () => {
    const { app } = makeApp();
    const regimen = await makeRegimen(app);
    const { body } = await write(app, "post", path(regimen), { ...draft, content: hugeDose }).expect(422);
    expect(body.type).toBe("/problems/unanswered-cautions");
    expect(body.errors.length).toBeGreaterThan(0);
    expect(body.errors.map(({ detail }: { detail: string }) => detail).join()).toMatch(/30,000/);
    expect(body.errors[0].pointer).toMatch(/^#\/content\/schedule\/orders\/0/);
  });

  test("saves them once each has a reason", async () => {
    const { app, needs } = makeApp();
    const regimen = await makeRegimen(app);
    const parsed = Revision.shape.content.parse(hugeDose);
    const appraisal = await needs.appraise(parsed);
    if (!appraisal.ok) throw new Error(appraisal.problem);
    const cautionReasons = appraisal.open.map(({ code, about, text }) => ({
      code,
      about,
      text,
      reason: "A test of the limit",
    }));
    const { body } = await write(app, "post", path(regimen), {
      ...draft,
      content: { ...hugeDose, cautionReasons },
    }).expect(201);
    expect(body.content.cautionReasons).toEqual(cautionReasons);
  });

  test.for([
    { name: "above the tolerance", relative: 1.1e-6 },
    { name: "not a number", relative: Number.NaN },
  ])("refuses a second opinion that is $name, and keeps nothing", async ({ relative }) => {
    const secondOpinion = { largestDifferenceMgPerL: 0.1, atH: 3, largestLevelMgPerL: 10, relative, points: 9 };
    const { app } = makeApp({ appraise: async () => ({ ok: true, open: [], secondOpinion }) });
    const regimen = await makeRegimen(app);
    const { body } = await write(app, "post", path(regimen), draft).expect(422);
    expect(body.type).toBe("/problems/second-opinion");
    expect((await request(app).get(path(regimen))).body.revisions).toEqual([]);
  });

  test.for([
    {
      name: "a dose before the start of the plan",
      schedule: {
        orders: [{ ...content.schedule.orders[0]!, when: { kind: "once", at: "2026-05-04T07:00:00+01:00" } }],
      },
      pointer: "#/content/schedule/orders/0/when/at",
    },
    {
      name: "an absorbed dose without an absorption rate",
      schedule: {
        orders: [
          {
            id: "a",
            give: { kind: "absorbed", amountMg: 100 },
            when: { kind: "once", at: "2026-05-04T08:00:00+01:00" },
          },
        ],
      },
      pointer: "#/content/setting/kinetics/absorptionRatePerH",
    },
    {
      name: "one dose with two records",
      schedule: { ...content.schedule, records: [content.schedule.records![0]!, content.schedule.records![0]!] },
      pointer: "#/content/schedule/records/1",
    },
    {
      name: "a pump log that is out of order",
      schedule: {
        orders: [
          {
            id: "a",
            give: {
              kind: "pump",
              steps: [
                { afterH: 2, rateMgPerH: 5 },
                { afterH: 1, rateMgPerH: 0 },
              ],
            },
            when: { kind: "once", at: "2026-05-04T08:00:00+01:00" },
          },
        ],
      },
      pointer: "#/content/schedule/orders/0/give/steps/1/afterH",
    },
  ])("refuses $name, naming the field", async ({ schedule, pointer }) => {
    const { app } = makeApp();
    const regimen = await makeRegimen(app);
    const { body } = await write(app, "post", path(regimen), { ...draft, content: { ...content, schedule } }).expect(
      422,
    );
    expect(body.errors.map((error: { pointer: string }) => error.pointer)).toContain(pointer);
  });

  test("refuses kinetics that contradict each other, with the discrepancy", async () => {
    const { app } = makeApp();
    const regimen = await makeRegimen(app);
    const clearanceLPerH = { value: 9, origin: { kind: "typed" } };
    const bad = { ...content, setting: { ...setting, kinetics: { ...setting.kinetics, clearanceLPerH } } };
    const { body } = await write(app, "post", path(regimen), { ...draft, content: bad }).expect(422);
    expect(body.errors).toHaveLength(1);
    expect(body.errors[0].pointer).toMatch(/^#\/content\/setting\/kinetics\//);
  });

  test("says 404 for a regimen of another case", async () => {
    const { app } = makeApp();
    const one = await makeRegimen(app);
    const other = await makeRegimen(app);
    await write(app, "post", path({ id: one.id, caseId: other.caseId }), draft).expect(404);
    await request(app)
      .get(path({ id: one.id, caseId: other.caseId }))
      .expect(404);
    await request(app)
      .get(path({ id: randomUUID(), caseId: one.caseId }))
      .expect(404);
  });
});

describe("GET /api/revisions/:id/sheet.pdf", () => {
  test("gives the same bytes each time, under a name of our own", async () => {
    const { app } = makeApp();
    const { id, contentHash } = await makeRevision(app);
    const sheet = async (query: string) =>
      request(app).get(`/api/revisions/${id}/sheet.pdf${query}`).buffer().expect(200);
    const first = await sheet("");
    expect(first.headers).toMatchObject({
      "content-type": "application/pdf",
      "cache-control": "no-store",
      "content-disposition": `inline; filename="ebbline-revision-1-${contentHash.slice(0, 8)}.pdf"`,
    });
    expect(Buffer.from(first.body).subarray(0, 5).toString()).toBe("%PDF-");
    expect(Buffer.compare((await sheet("?paper=A4")).body, first.body)).toBe(0);
    expect(Buffer.compare((await sheet("?paper=Letter")).body, first.body)).not.toBe(0);
  });

  test("refuses another paper and says 404 for no such revision", async () => {
    const { app } = makeApp();
    const { id } = await makeRevision(app);
    await request(app).get(`/api/revisions/${id}/sheet.pdf?paper=A3`).expect(422);
    await request(app).get(`/api/revisions/${randomUUID()}/sheet.pdf`).expect(404);
  });
});
