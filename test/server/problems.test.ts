import { randomUUID } from "node:crypto";
import { Agent, request as send } from "node:http";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { problemTable } from "../../server/problems.ts";
import { Problem } from "../../shared/contract/problem.ts";
import { listening } from "./support/listening.ts";
import { makeApp, makeCase, makeRegimen, write } from "./support/make-app.ts";
import { caseDraft, draft } from "./support/samples.ts";

/** Holds of every refusal: the media type, the status, a type of our list, and nothing from inside the server. */
function expectProblem(answer: request.Response, status: number): Problem {
  expect(answer.headers["content-type"]).toBe("application/problem+json; charset=utf-8");
  const problem = Problem.parse(JSON.parse(answer.text));
  expect([answer.status, problem.status]).toEqual([status, status]);
  expect(Object.keys(problemTable).map((code) => `/problems/${code}`)).toContain(problem.type);
  expect(answer.text).not.toMatch(/node_modules|SQLITE|\bSELECT\b|\bat .*\.[jt]s\b/);
  expect(problem.requestId).toBe(answer.headers["x-request-id"]);
  return problem;
}

const json = (app: Parameters<typeof request>[0], text: string) =>
  request(app).post("/api/predictions").set("Content-Type", "application/json").send(text);

describe("what Express would answer in HTML", () => {
  test.for(["/api/nothing", "/api", "/nothing", "/api/cases/x/y/z", "/api/__proto__", "//api/cases"])(
    "an address that is not there: %s",
    async (path) => {
      expectProblem(await request(makeApp().app).get(path), 404);
    },
  );

  test.for(["{", '{"a":1', "[1,]", "nothing", '"\\x"', "\u0000"])("a body that is not JSON: %j", async (text) => {
    expect(expectProblem(await json(makeApp().app, text), 400).type).toBe("/problems/malformed-json");
  });

  test.for(["null", "true", "12", '"text"', "[]"])("a body that is JSON but no object: %s", async (text) => {
    expectProblem(await json(makeApp().app, text), 422);
  });

  test("a missing body", async () => {
    const { app } = makeApp();
    expect(expectProblem(await request(app).post("/api/predictions"), 422).type).toBe("/problems/missing-body");
    expectProblem(await request(app).post("/api/predictions").set("Content-Type", "application/json"), 422);
  });

  test.for([
    "text/plain",
    "application/x-www-form-urlencoded",
    "multipart/form-data; boundary=x",
    "application/jsonx",
    "application/merge-patch+json",
  ])("another media type: %s", async (type) => {
    expectProblem(await request(makeApp().app).post("/api/predictions").set("Content-Type", type).send("{}"), 415);
  });

  test("a body in another character set or compressed", async () => {
    const { app } = makeApp();
    expectProblem(
      await request(app).post("/api/predictions").set("Content-Type", "application/json; charset=koi8-r").send("{}"),
      415,
    );
    expectProblem(await json(app, "{}").set("Content-Encoding", "gzip"), 415);
  });

  test("a body above the limit", async () => {
    const { app } = makeApp();
    expectProblem(await json(app, JSON.stringify({ text: "x".repeat(2 * 1024 * 1024) })), 413);
    const fits = JSON.stringify({ text: "x".repeat(2 * 1024 * 1024 - 11) });
    expect(fits).toHaveLength(2 * 1024 * 1024);
    expectProblem(await json(app, fits), 422);
  });

  test.for(["/api/cases/%ZZ", "/api/cases/%", "/api/cases/%c3%28"])("a bad escape: %s", async (path) => {
    expect(expectProblem(await request(makeApp().app).get(path), 400).type).toBe("/problems/malformed-path");
  });

  test.for(["/api/cases/%00", "/api/cases/a%0d%0ab", "/%00"])("a control character: %s", async (path) => {
    expect(expectProblem(await request(makeApp().app).get(path), 400).type).toBe("/problems/malformed-path");
  });

  test.for([
    { path: "/api/cases", method: "DELETE", allow: "GET, HEAD, POST" },
    { path: "/api/predictions", method: "GET", allow: "POST" },
    { path: "/api/cases/x", method: "PUT", allow: "GET, HEAD, PATCH" },
    { path: "/api/health", method: "OPTIONS", allow: "GET, HEAD" },
    { path: "/api/revisions/x/sheet.pdf", method: "POST", allow: "GET, HEAD" },
    { path: "/api/case-files", method: "PATCH", allow: "POST" },
  ])("a wrong method: $method $path", async ({ path, method, allow }) => {
    const answer = await request(makeApp().app)[method.toLowerCase() as "delete"](path);
    expectProblem(answer, 405);
    expect(answer.headers["allow"]).toBe(allow);
  });
});

describe("hostile JSON", () => {
  test.for([
    { name: "brackets in its text", text: `${'["]]",'.repeat(30)}1${"]".repeat(30)}` },
    { name: "a quote escaped in its text", text: `["\\"",${"[".repeat(30)}${"]".repeat(30)}]` },
    { name: "a backslash at the end of its text", text: `["\\\\",${"[".repeat(30)}${"]".repeat(30)}]` },
  ])("does not hide its depth behind $name", async ({ text }) => {
    expect(JSON.parse(text)).toBeInstanceOf(Array);
    expect(expectProblem(await json(makeApp().app, text), 400).type).toBe("/problems/too-deep");
  });

  test("may hold brackets in its text", async () => {
    expect(
      expectProblem(await json(makeApp().app, JSON.stringify({ text: "[".repeat(100) })), 422).errors,
    ).toContainEqual({
      pointer: "#/text",
      detail: "is not a known field",
    });
  });

  test.for(["koi8-r", "utf-16", "utf-16le", "utf-32"])("in %s is refused", async (charset) => {
    const { app } = makeApp();
    expectProblem(
      await request(app)
        .post("/api/predictions")
        .set("Content-Type", `application/json; charset=${charset}`)
        .send("{}"),
      415,
    );
  });

  test("that writes a forbidden name with an escape is refused all the same", async () => {
    expectProblem(await json(makeApp().app, '{"\\u005f_proto__":{"polluted":true}}'), 422);
  });

  test.for([
    { text: '{"horizonH":24,"doses":[],"horizonH":48}', pointers: ["#/horizonH"] },
    { text: '{"doses":[{"atH":0},{"amountMg":50,"atH":0,"\\u0061mountMg":500}]}', pointers: ["#/doses/1/amountMg"] },
    { text: '{"a":{"x":"\\"x\\":1,","x":[{"y":1},{"y":{},"y":[]}]}}', pointers: ["#/a/x", "#/a/x/1/y"] },
  ])("that gives a field twice is refused: $text", async ({ text, pointers }) => {
    const { errors } = expectProblem(await json(makeApp().app, text), 422);
    expect(errors!.map(({ pointer }) => pointer)).toEqual(pointers);
    expect(errors![0]!.detail).toBe("is given more than once in one object");
  });

  test("may name a field in several objects, and have colons in its text", async () => {
    const { errors } = expectProblem(await json(makeApp().app, '[{"a":"b:c"},{"a":"\\":{"}]'), 422);
    expect(errors!.map(({ pointer }) => pointer)).toEqual(["#"]);
  });

  test("that is not UTF-8 is refused, never kept with other signs in it", async () => {
    const { app } = makeApp();
    const { port } = await listening(app);
    const answer = await fetch(`http://127.0.0.1:${port}/api/cases`, {
      method: "POST",
      headers: { "Content-Type": "application/json", "Idempotency-Key": randomUUID() },
      body: Buffer.from(JSON.stringify({ ...caseDraft, label: "M\u00fcller ward" }), "latin1"),
    });
    expect(await answer.json()).toMatchObject({ status: 400, detail: "the body is not UTF-8 text" });
    expect((await request(app).get("/api/cases")).body.cases).toEqual([]);
  });

  test.for([25, 40_000, 1_000_000])("of %i levels is refused", async (depth) => {
    const answer = await json(makeApp().app, "[".repeat(depth) + "]".repeat(depth));
    expectProblem(answer, 400);
  });

  test("that reaches for the prototype is refused", async () => {
    const { app } = makeApp();
    expectProblem(await json(app, '{"__proto__":{"polluted":true}}'), 422);
    expectProblem(await json(app, '{"constructor":{"prototype":{"polluted":true}}}'), 422);
    expect(({} as Record<string, unknown>)["polluted"]).toBeUndefined();
  });

  test("of 100,000 characters in each text field is answered within 200 ms", async () => {
    const { app } = makeApp();
    for (const text of ["a".repeat(100_000), "2026-05-04T".repeat(10_000), " ".repeat(100_000)]) {
      const startedAt = performance.now();
      await write(app, "post", "/api/cases", {
        ...caseDraft,
        label: text,
        timeZone: text,
        setting: { ...caseDraft.setting, plan: { start: text, horizonH: 1 } },
      }).expect(422);
      expect(performance.now() - startedAt).toBeLessThan(200);
    }
  });
});

describe("a fault of our own", () => {
  const secret = "Bed 4 in a message";

  test("is a 500 without detail", async () => {
    const { app, needs } = makeApp();
    needs.stores.cases.list = async () => {
      throw new TypeError(secret);
    };
    const answer = await request(app).get("/api/cases");
    expect(expectProblem(answer, 500)).toMatchObject({
      type: "/problems/internal",
      title: "Something went wrong in the server",
    });
    expect(answer.text).not.toContain(secret);
  });

  test("in a calculation, such as a level that is not a number, is never sent as null", async () => {
    const { app } = makeApp({ appraise: async () => Promise.reject(new RangeError(secret)) });
    const { id, caseId } = await makeRegimen(app);
    expectProblem(await write(app, "post", `/api/cases/${caseId}/regimens/${id}/revisions`, draft), 500);
  });

  test.for([
    { code: "SQLITE_FULL", status: 507, gaveUp: [] },
    { code: "SQLITE_BUSY", status: 503, gaveUp: [] },
    { code: "SQLITE_IOERR_FSYNC", status: 500, gaveUp: ["the disk failed"] },
    { code: "SQLITE_READONLY_DIRECTORY", status: 500, gaveUp: ["the disk failed"] },
  ])("of the disk, $code, is a $status", async ({ code, status, gaveUp }) => {
    const made = makeApp();
    made.needs.stores.cases.add = async () => {
      throw Object.assign(new Error(secret), { code });
    };
    expectProblem(await write(made.app, "post", "/api/cases", caseDraft), status);
    expect(made.gaveUp).toEqual(gaveUp);
  });

  test("a row that was changed in the file is refused, not shown", async () => {
    const { app, db } = makeApp();
    const { id } = await makeCase(app);
    db.prepare("UPDATE case_record SET label = 'Bed 5' WHERE id = ?").run(id);
    const answer = await request(app).get(`/api/cases/${id}`);
    const problem = expectProblem(answer, 500);
    expect(problem.detail).toBe(`case ${id} is not as it was stored; restore the database from a backup`);
  });
});

describe("a refusal while the sender is still sending", () => {
  test("reaches it, and the connection can be used again", async () => {
    const { port } = await listening(makeApp().app);
    const agent = new Agent({ keepAlive: true, maxSockets: 1 });
    const post = (path: string) =>
      new Promise<number>((resolve, reject) => {
        const sending = send(
          { port, agent, path, method: "POST", headers: { "Content-Type": "application/json" } },
          (answer) => {
            answer.resume().on("end", () => resolve(answer.statusCode!));
          },
        );
        sending.on("error", reject);
        for (let chunk = 0; chunk < 50; chunk++) sending.write("x".repeat(100_000));
        sending.end();
      });
    for (let round = 0; round < 20; round++)
      expect(await post(round % 2 === 0 ? "/api/predictions" : "/api/nothing")).toBe(round % 2 === 0 ? 413 : 404);
    agent.destroy();
  });
});
