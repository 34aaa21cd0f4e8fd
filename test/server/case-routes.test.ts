import { randomUUID } from "node:crypto";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { CaseAnswer, WholeCase } from "../../shared/contract/answers.ts";
import type { Case } from "../../shared/contract/case.ts";
import { makeApp, makeCase, makeRevision, now, write } from "./support/make-app.ts";
import { caseDraft, setting } from "./support/samples.ts";

describe("POST /api/cases", () => {
  test("makes a case and says where it is", async () => {
    const { app } = makeApp();
    const { body, headers } = await write(app, "post", "/api/cases", caseDraft).expect(201);
    expect(CaseAnswer.parse(body)).toMatchObject({
      label: "Bed 4",
      version: 1,
      archived: false,
      demo: false,
      createdAt: now,
    });
    expect(headers["location"]).toBe(`/api/cases/${body.id}`);
    await request(app).get(headers["location"]!).expect(200);
  });

  test("refuses fields that only the server may set", async () => {
    const { app } = makeApp();
    const { body } = await write(app, "post", "/api/cases", { ...caseDraft, id: randomUUID(), demo: true }).expect(422);
    expect(body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual(["#/id", "#/demo"]);
  });

  test("names each bad field with its value and what is allowed", async () => {
    const { app } = makeApp();
    const bad = {
      ...caseDraft,
      timeZone: "Mars/Base",
      setting: { ...setting, kinetics: { ...setting.kinetics, volumeL: { value: 0.001, origin: { kind: "typed" } } } },
    };
    const { body } = await write(app, "post", "/api/cases", bad).expect(422);
    expect(body.errors).toEqual([
      { pointer: "#/timeZone", detail: 'must be an IANA time zone such as Europe/London, got "Mars/Base"' },
      { pointer: "#/setting/kinetics/volumeL/value", detail: "must be from 0.01 to 50000 L, got 0.001" },
    ]);
  });

  test("refuses a span of added clearance that ends before it begins, in whatever offsets", async () => {
    const session = {
      id: "s",
      kind: "added-clearance",
      from: "2026-05-04T14:00:00+01:00",
      addedClearanceLPerH: 3.5,
      origin: { kind: "typed" },
    };
    const { app } = makeApp();
    const made = (until: string) =>
      write(app, "post", "/api/cases", {
        ...caseDraft,
        setting: { ...setting, eliminationChanges: [{ ...session, until }] },
      });
    const { body } = await made("2026-05-04T13:00:00Z").expect(422);
    expect(body.errors).toEqual([
      {
        pointer: "#/setting/eliminationChanges/0/until",
        detail: 'must be later than from, got "2026-05-04T13:00:00Z"',
      },
    ]);
    await made("2026-05-04T13:30:00Z").expect(201);
  });

  test.for(["a\nb", "a\tb", "a\u001b[31m", "a\u2028b", "\u202egm 001", "\u2067gm 001\u2069"])(
    "refuses a label that does not read as it was typed (%j)",
    async (label) => {
      const { body } = await write(makeApp().app, "post", "/api/cases", { ...caseDraft, label }).expect(422);
      expect(body.errors).toEqual([
        {
          pointer: "#/label",
          detail: `must be one line without control characters or signs that turn the direction of writing, got ${JSON.stringify(label)}`,
        },
      ]);
    },
  );

  test("takes labels in right-to-left scripts and composed signs", async () => {
    const label = "\u0645\u0631\u064a\u0636 \u05d7\u05d5\u05dc\u05d4 \u{1f469}\u200d\u2695\ufe0f";
    await write(makeApp().app, "post", "/api/cases", { ...caseDraft, label }).expect(201);
  });

  test.for(["a\u0000b", "a\ud800"])(
    "refuses text that the database would not give back as it came (%j)",
    async (label) => {
      const { app } = makeApp();
      const { body } = await write(app, "post", "/api/cases", { ...caseDraft, label }).expect(422);
      expect(body.errors[0].pointer).toBe("#/label");
    },
  );

  test("gives markup, quotes and other scripts back as they came", async () => {
    const { app } = makeApp();
    const label = `<img src=x onerror=alert(1)> "'; DROP TABLE case_record; -- µ 漢字 🧪`;
    const { body } = await write(app, "post", "/api/cases", { ...caseDraft, label }).expect(201);
    expect((await request(app).get(`/api/cases/${body.id}`)).body.case.label).toBe(label);
  });
});

describe("GET /api/cases", () => {
  test("lists the newest change first and archived ones only when asked", async () => {
    let minute = 0;
    const { app } = makeApp({ clock: () => `2026-05-04T09:0${minute++}:00Z` });
    const first = await makeCase(app);
    const second = await makeCase(app);
    await write(app, "patch", `/api/cases/${first.id}`, { version: 1, notes: "later" }).expect(200);
    const ids = async (path: string) => (await request(app).get(path).expect(200)).body.cases.map(({ id }: Case) => id);
    expect(await ids("/api/cases")).toEqual([first.id, second.id]);
    await write(app, "patch", `/api/cases/${first.id}`, { version: 2, archived: true }).expect(200);
    expect(await ids("/api/cases")).toEqual([second.id]);
    expect(await ids("/api/cases?archived=only")).toEqual([first.id]);
  });

  test.for(["?archived=yes", "?archived=only&archived=none", "?sort=label", "?archived[a]=only"])(
    "refuses the query %s",
    async (query) => {
      const { app } = makeApp();
      await request(app).get(`/api/cases${query}`).expect(422);
    },
  );
});

describe("GET /api/cases/:id", () => {
  test("gives the alternatives with the newest revision of each", async () => {
    const { app } = makeApp();
    const revision = await makeRevision(app);
    await write(app, "post", `/api/cases/${revision.caseId}/regimens`, { label: "Empty one" }).expect(201);
    const { body } = await request(app).get(`/api/cases/${revision.caseId}`).expect(200);
    const { regimens } = WholeCase.parse(body);
    expect(regimens.map(({ label, latestRevisionNumber }) => [label, latestRevisionNumber])).toEqual([
      ["Every 8 h", 1],
      ["Empty one", 0],
    ]);
    expect(regimens[0]!.latest).toEqual(revision);
    expect(regimens[1]!.latest).toBeUndefined();
  });

  test.for([randomUUID(), "nothing", "%2e%2e%2fetc", "1' OR '1'='1"])("says 404 for the id %s", async (id) => {
    const { app } = makeApp();
    const { body } = await request(app).get(`/api/cases/${id}`).expect(404);
    expect(body.type).toBe("/problems/not-found");
  });
});

describe("PATCH /api/cases/:id", () => {
  test("counts versions and refuses a change from an older one", async () => {
    const { app } = makeApp();
    const { id } = await makeCase(app);
    const { body } = await write(app, "patch", `/api/cases/${id}`, { version: 1, label: "Bed 5" }).expect(200);
    expect(body).toMatchObject({ version: 2, label: "Bed 5" });
    const stale = await write(app, "patch", `/api/cases/${id}`, { version: 1, label: "Bed 6" }).expect(409);
    expect(stale.body.detail).toBe("the case has changed: you had seen 1, the newest is 2");
    expect((await request(app).get(`/api/cases/${id}`)).body.case.label).toBe("Bed 5");
  });

  test("says 404 where there is no such case", async () => {
    const { app } = makeApp();
    await write(app, "patch", `/api/cases/${randomUUID()}`, { version: 1 }).expect(404);
  });
});
