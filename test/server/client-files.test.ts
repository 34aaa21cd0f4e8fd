import { randomUUID } from "node:crypto";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import request from "supertest";
import { afterAll, describe, expect, test } from "vitest";
import { makeApp } from "./support/make-app.ts";

const above = mkdtempSync(join(tmpdir(), "ebbline-client-"));
// As .build/client, which lies in a folder whose name begins with a dot.
const clientFolder = join(above, ".built", "client");
mkdirSync(join(clientFolder, "assets"), { recursive: true });
writeFileSync(join(above, "secret.txt"), "secret");
writeFileSync(join(clientFolder, ".env"), "secret");
writeFileSync(join(clientFolder, "index.html"), "<title>the page</title>");
writeFileSync(join(clientFolder, "icon.svg"), "<svg/>");
writeFileSync(join(clientFolder, "assets", "main-4f2a.js"), "1");
afterAll(() => rmSync(above, { recursive: true }));

const { app } = makeApp({ clientFolder });

describe("the built page", () => {
  test.for(["/", `/cases/${randomUUID()}`, "/?a=1"])("is served at %s and never kept", async (path) => {
    const { text, headers } = await request(app).get(path).expect(200);
    expect(text).toBe("<title>the page</title>");
    expect(headers).toMatchObject({ "content-type": "text/html; charset=utf-8", "cache-control": "no-store" });
  });

  test("has files with a hash in their name, which may be kept for a year", async () => {
    const { headers } = await request(app).get("/assets/main-4f2a.js").expect(200);
    expect(headers["cache-control"]).toBe("public, max-age=31536000, immutable");
    expect(headers["content-type"]).toMatch(/^text\/javascript/);
    expect((await request(app).get("/icon.svg").expect(200)).headers["cache-control"]).toBe("no-store");
  });

  test.for([
    "/nowhere",
    "/cases",
    "/cases/x/y",
    "/assets/",
    "/assets/other.js",
    "/index.html/",
    "/.env",
    "/../secret.txt",
    "/..%2fsecret.txt",
    "/%2e%2e/secret.txt",
    "/assets/..%5c..%5csecret.txt",
  ])("%s is a 404 problem", async (path) => {
    const { text, headers } = await request(app).get(path).expect(404);
    expect(headers["content-type"]).toMatch(/^application\/problem\+json/);
    expect(text).not.toContain("secret");
  });

  test("takes no writes", async () => {
    const { headers } = await request(app).post("/").expect(405);
    expect(headers["allow"]).toBe("GET, HEAD");
  });
});
