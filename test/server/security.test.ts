import { request as send } from "node:http";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { listening } from "./support/listening.ts";
import { makeApp, write } from "./support/make-app.ts";
import { caseDraft, prediction } from "./support/samples.ts";

describe("headers (OWASP ASVS 5.0.0, 3.4)", () => {
  test.for(["/api/health", "/api/nothing", "/api/docs", "/api/cases"])("of %s", async (path) => {
    const { headers } = await request(makeApp().app).get(path);
    expect(headers).toMatchObject({
      "x-content-type-options": "nosniff",
      "referrer-policy": "no-referrer",
      "cross-origin-opener-policy": "same-origin",
      "cross-origin-resource-policy": "same-origin",
      "permissions-policy": "geolocation=(), camera=(), microphone=()",
      "cache-control": "no-store",
      "x-frame-options": "DENY",
    });
    expect(headers["content-security-policy"]!.split(";").map((part) => part.trim())).toEqual([
      "default-src 'none'",
      "script-src 'self'",
      "style-src 'self'",
      "img-src 'self' data:",
      "font-src 'self'",
      "connect-src 'self'",
      "form-action 'self'",
      "base-uri 'none'",
      "object-src 'none'",
      "frame-ancestors 'none'",
    ]);
    for (const absent of ["x-powered-by", "strict-transport-security", "access-control-allow-origin", "etag"])
      expect(headers).not.toHaveProperty(absent);
  });

  test("ask for https only where a proxy speaks it", async () => {
    const settings = { host: "127.0.0.1", publicNames: [], transport: "behind-tls", requestsPerMinute: 100 } as const;
    const { headers } = await request(makeApp({ settings }).app).get("/api/health");
    expect(headers["strict-transport-security"]).toBe("max-age=31536000; includeSubDomains");
  });
});

describe("writes from another site (ASVS 3.5)", () => {
  test.for([
    { headers: { "Sec-Fetch-Site": "cross-site" } },
    { headers: { "Sec-Fetch-Site": "same-site" } },
    { headers: { "Sec-Fetch-Site": "none" } },
    { headers: { Origin: "https://elsewhere.example" } },
    { headers: { Origin: "null" } },
    { headers: { Origin: "http://127.0.0.1:1" } },
  ])("are refused: $headers", async ({ headers }) => {
    const { app } = makeApp();
    const { body } = await write(app, "post", "/api/cases", caseDraft).set(headers).expect(403);
    expect(body.type).toBe("/problems/cross-site");
    expect((await request(app).get("/api/cases")).body.cases).toEqual([]);
  });

  test("are taken from our own page and from a program that is no browser", async () => {
    const { server, port } = await listening(makeApp().app);
    const ask = (headers: Record<string, string>) =>
      request(server).post("/api/predictions").set(headers).send(prediction);
    await ask({ "Sec-Fetch-Site": "same-origin", Origin: `http://127.0.0.1:${port}` }).expect(200);
    await ask({ Origin: `http://127.0.0.1:${port}` }).expect(200);
    await ask({}).expect(200);
  });
});

describe("the Host header (DNS rebinding)", () => {
  test.for([
    "evil.example",
    "evil.example:7317",
    "127.0.0.1.evil.example",
    "localhost.evil.example",
    "[::2]",
    "127.0.0.1, evil.example",
  ])("%j is refused", async (host) => {
    const { port } = await listening(makeApp().app);
    const status = await new Promise((resolve, reject) => {
      send({ port, host: "127.0.0.1", path: "/api/cases", headers: { Host: host } }, (answer) =>
        resolve(answer.resume().statusCode),
      )
        .on("error", reject)
        .end();
    });
    expect(status).toBe(421);
  });

  test.for(["127.0.0.1:7317", "localhost", "LOCALHOST:80", "[::1]:7317", "plan.example"])(
    "%s is taken",
    async (host) => {
      const settings = {
        host: "127.0.0.1",
        publicNames: ["plan.example"],
        transport: "plain",
        requestsPerMinute: 100,
      } as const;
      await request(makeApp({ settings }).app).get("/api/health").set("Host", host).expect(200);
    },
  );
});

describe("limits", () => {
  test("too many requests are refused with a time to wait, whatever address they claim to come from", async () => {
    const settings = { host: "127.0.0.1", publicNames: [], transport: "plain", requestsPerMinute: 3 } as const;
    const { app } = makeApp({ settings });
    for (let round = 0; round < 3; round++)
      await request(app).get("/api/health").set("X-Forwarded-For", `10.0.0.${round}`).expect(200);
    const { body, headers } = await request(app).get("/api/health").set("X-Forwarded-For", "10.0.0.9").expect(429);
    expect(body.type).toBe("/problems/too-many-requests");
    expect(headers["retry-after"]).toBe("60");
  });
});
