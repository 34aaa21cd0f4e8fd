import { randomUUID } from "node:crypto";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { makeApp, makeCase, makeRegimen, write } from "./support/make-app.ts";
import { caseDraft, draft } from "./support/samples.ts";

describe("Idempotency-Key", () => {
  test("a retry answers what the first try answered and makes no second revision", async () => {
    const { app } = makeApp();
    const { id, caseId } = await makeRegimen(app);
    const path = `/api/cases/${caseId}/regimens/${id}/revisions`;
    const key = randomUUID();
    const first = await write(app, "post", path, draft, key).expect(201);
    await write(app, "post", path, { ...draft, basedOnNumber: 1, reason: "Second plan" }).expect(201);
    // By now the first wish would be stale: its retry must not be judged by what came after it.
    const retry = await write(app, "post", path, draft, key).expect(201);
    expect(retry.body).toEqual(first.body);
    const numbers = (await request(app).get(path)).body.revisions.map(({ number }: { number: number }) => number);
    expect(numbers).toEqual([2, 1]);
  });

  test("two tries at once make one revision", async () => {
    const { app } = makeApp();
    const { id, caseId } = await makeRegimen(app);
    const path = `/api/cases/${caseId}/regimens/${id}/revisions`;
    const key = randomUUID();
    const answers = await Promise.all([1, 2, 3].map(() => write(app, "post", path, draft, key)));
    expect(new Set(answers.map(({ status, body }) => `${status} ${body.id}`)).size).toBe(1);
    expect((await request(app).get(path)).body.revisions).toHaveLength(1);
  });

  test("the same key with another body, or at another address, is refused", async () => {
    const { app } = makeApp();
    const key = randomUUID();
    const { body } = await write(app, "post", "/api/cases", caseDraft, key).expect(201);
    const other = await write(app, "post", "/api/cases", { ...caseDraft, label: "Bed 9" }, key).expect(422);
    expect(other.body.type).toBe("/problems/key-reused");
    await write(app, "patch", `/api/cases/${body.id}`, { version: 1 }, key).expect(422);
    expect((await request(app).get("/api/cases")).body.cases).toHaveLength(1);
  });

  test("the same body in another order of its fields is the same wish", async () => {
    const { app } = makeApp();
    const key = randomUUID();
    const { notes, label, ...rest } = caseDraft;
    const first = await write(app, "post", "/api/cases", { ...rest, label, notes }, key).expect(201);
    const retry = await write(app, "post", "/api/cases", { notes, ...rest, label }, key).expect(201);
    expect(retry.body.id).toBe(first.body.id);
  });

  test("a refused write may be tried again with the same key", async () => {
    const { app } = makeApp();
    const { id } = await makeCase(app);
    const key = randomUUID();
    await write(app, "patch", `/api/cases/${id}`, { version: 7, label: "x" }, key).expect(409);
    await write(app, "patch", `/api/cases/${id}`, { version: 1, label: "x" }, key).expect(200);
  });

  test.for(["", "not-a-uuid", "00000000-0000-0000-0000"])("a write with the key %j is refused", async (key) => {
    const { app } = makeApp();
    const { body } = await write(app, "post", "/api/cases", caseDraft, key).expect(400);
    expect(body.type).toBe("/problems/key-missing");
  });

  test("a write without a key is refused", async () => {
    const { app } = makeApp();
    await request(app).post("/api/cases").send(caseDraft).expect(400);
    expect((await request(app).get("/api/cases")).body.cases).toEqual([]);
  });
});
