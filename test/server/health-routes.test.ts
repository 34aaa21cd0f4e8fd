import request from "supertest";
import { describe, expect, test } from "vitest";
import { makeApp } from "./support/make-app.ts";

describe("health", () => {
  test("is live whatever the database does, and ready only while it is open", async () => {
    const { app, db } = makeApp();
    await request(app).get("/api/ready").expect(200, { status: "ready" });
    db.close();
    await request(app).get("/api/health").expect(200, { status: "live" });
    const { body } = await request(app).get("/api/ready").expect(503);
    expect(body.type).toBe("/problems/not-ready");
  });

  test("looks through the whole file at most once a minute", async () => {
    let minute = 0;
    let checks = 0;
    const made = makeApp({ clock: () => `2026-05-04T09:0${minute}:00Z` });
    const { checkWhole } = made.needs.stores;
    Object.assign(made.needs.stores, {
      checkWhole: () => {
        checks++;
        return checkWhole();
      },
    });
    await request(made.app).get("/api/ready").expect(200);
    await request(made.app).get("/api/ready").expect(200);
    expect(checks).toBe(1);
    minute = 1;
    await request(made.app).get("/api/ready").expect(200);
    expect(checks).toBe(2);
  });

  test("is not ready once a row refers to one that is gone", async () => {
    const { app, db } = makeApp();
    db.pragma("foreign_keys = OFF");
    db.exec(`INSERT INTO regimen (id, case_id, position, label, retired, created_at, seal)
      VALUES ('${"a".repeat(36)}', 'gone', 1, 'x', 0, '2026-05-04T09:00:00Z', '${"0".repeat(64)}')`);
    await request(app).get("/api/ready").expect(503);
  });
});
