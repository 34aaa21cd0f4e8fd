import request from "supertest";
import { describe, expect, test } from "vitest";
import { silentDescription } from "../../server/silent-description.ts";
import { makeApp, makeRevision, write } from "./support/make-app.ts";
import { caseDraft, content, draft } from "./support/samples.ts";

/** What a user typed, in each place where it can be typed. */
const secrets = [
  "SECRET-LABEL",
  "SECRET-NOTE",
  "SECRET-REASON",
  "SECRET-NAME",
  "SECRET-QUERY",
  "SECRET-HEADER",
  "SECRET-PATH",
  "424242",
];

describe("the log", () => {
  test("has one line a request with its route and outcome, and nothing of a case", async () => {
    const { app, log, needs } = makeApp();
    const { body: kase } = await write(app, "post", "/api/cases", {
      ...caseDraft,
      label: "SECRET-LABEL",
      notes: "SECRET-NOTE",
    }).expect(201);
    const { body: regimen } = await write(app, "post", `/api/cases/${kase.id}/regimens`, {
      label: "SECRET-LABEL",
    }).expect(201);
    const said = {
      ...draft,
      reason: "SECRET-REASON",
      preparedBy: "SECRET-NAME",
      content: { ...content, caseLabel: "SECRET-LABEL" },
    };
    await write(app, "post", `/api/cases/${kase.id}/regimens/${regimen.id}/revisions`, said).expect(201);
    await request(app).get("/api/cases?q=SECRET-QUERY").set("User-Agent", "SECRET-HEADER\u00ff").expect(422);
    await request(app).get("/api/cases/SECRET-PATH").expect(404);
    await request(app).get("/SECRET-PATH%0aforged").expect(400);
    await request(app)
      .post("/api/predictions")
      .set("Content-Type", "application/json")
      .send('{"SECRET-NOTE": 424242')
      .expect(400);
    await write(app, "post", "/api/predictions", { doses: "SECRET-NOTE", horizonH: 424242 }).expect(422);
    needs.stores.cases.list = async () => {
      throw new Error("SECRET-LABEL\n    at SECRET-NOTE (424242)", { cause: new Error("SECRET-REASON") });
    };
    await request(app).get("/api/cases").expect(500);

    const lines = log.map((line) => JSON.parse(line));
    expect(
      lines.filter(({ msg }) => msg === "request").map(({ method, route, status }) => `${method} ${route} ${status}`),
    ).toEqual([
      "POST /cases 201",
      "POST /cases/:caseId/regimens 201",
      "POST /cases/:caseId/regimens/:regimenId/revisions 201",
      "GET /cases 422",
      "GET /cases/:caseId 404",
      "GET none 400",
      "POST /predictions 400",
      "POST /predictions 422",
      "GET /cases 500",
    ]);
    for (const secret of secrets) expect(log.join("")).not.toContain(secret);
    expect(log.join("")).not.toContain(kase.id);
    const failed = lines.find(({ msg }) => msg === "request failed");
    expect(failed).toMatchObject({ code: "internal", error: { name: "Error" } });
    expect(failed.error.frames[0]).toMatch(/^at .*log\.test\.ts/);
    expect(Object.keys(lines[0]).sort()).toEqual([
      "finished",
      "level",
      "method",
      "ms",
      "msg",
      "program",
      "requestId",
      "route",
      "status",
      "time",
    ]);
  });

  test("does not take a request id from outside", async () => {
    const { app, log } = makeApp();
    const { headers } = await request(app).get("/api/health").set("X-Request-Id", "SECRET-HEADER").expect(200);
    expect(JSON.parse(log[0]!).requestId).toBe(headers["x-request-id"]);
    expect(headers["x-request-id"]).toMatch(/^[0-9a-f-]{36}$/);
  });

  test("has nothing of a contract error of a stored row", async () => {
    const { app, db, log } = makeApp();
    const { id } = await makeRevision(app);
    db.exec("DROP TRIGGER revision_never_changes");
    db.prepare("UPDATE revision SET reason = 'SECRET-REASON' WHERE id = ?").run(id);
    await request(app).get(`/api/revisions/${id}`).expect(500);
    expect(log.join("")).not.toContain("SECRET-REASON");
  });
});

describe("silentDescription", () => {
  test("logs no frames where the message cannot be told from them", () => {
    const error = new Error("x");
    expect(silentDescription(error).frames).not.toEqual([]);
    error.message = "changed after its stack was written";
    expect(silentDescription(error).frames).toEqual([]);
  });

  test("says no more of what is no error than what kind of thing it is", () => {
    expect(silentDescription("SECRET")).toEqual({ name: "string", frames: [] });
  });
});
