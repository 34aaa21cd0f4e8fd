import { Validator } from "@seriousme/openapi-schema-validator";
import type { Router } from "express";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { apiRouters } from "../../server/app.ts";
import { expressPath } from "../../server/openapi/operation.ts";
import { standingCaution } from "../../shared/cautions/standing.ts";
import { makeApp } from "./support/make-app.ts";

interface Layer {
  readonly route?: { readonly path: string; readonly stack: readonly { readonly method?: string }[] };
}

/** Every method and path that Express would really answer. */
function routesOf(routers: readonly Router[]): string[] {
  return routers
    .flatMap((router) => router.stack as readonly Layer[])
    .flatMap(({ route }) =>
      (route?.stack ?? []).filter(({ method }) => method !== undefined).map(({ method }) => `${method} ${route!.path}`),
    );
}

const document = async () => (await request(makeApp().app).get("/api/openapi.json").expect(200)).body;

describe("/api/openapi.json", () => {
  test("is a valid OpenAPI 3.1 document", async () => {
    const validator = new Validator();
    const { valid, errors } = await validator.validate(await document());
    expect(errors).toBeUndefined();
    expect(valid).toBe(true);
    expect(validator.version).toBe("3.1");
  });

  test("has every route of the server, and the server has every route of it", async () => {
    const { paths } = await document();
    const described = Object.entries(paths).flatMap(([path, methods]) =>
      Object.keys(methods as object).map((method) => `${method} ${expressPath(path)}`),
    );
    const there = [...new Set(routesOf(apiRouters(makeApp().needs)))];
    expect(described.sort()).toEqual(there.sort());
    expect(there.length).toBeGreaterThan(15);
  });

  test("refers only to schemas that it has, each with its limits and units", async () => {
    const whole = await document();
    const names = [...JSON.stringify(whole).matchAll(/"\$ref":"#\/components\/schemas\/(\w+)"/g)].map(
      ([, name]) => name!,
    );
    expect([...new Set(names)].sort()).toEqual(Object.keys(whole.components.schemas).sort());
    expect(JSON.stringify(whole)).not.toMatch(/"\$ref":"(?!#\/components\/schemas\/)/);
    expect(whole.components.schemas.PredictionRequestInput.properties.horizonH).toMatchObject({
      maximum: 17_568,
      description: "Length of the plan, h",
    });
    expect(whole.components.schemas.PredictionRequestInput.additionalProperties).toBe(false);
    // A request may leave out what has a default; an answer always has it.
    expect(whole.components.schemas.ScheduleInput.required).toEqual(["orders"]);
    expect(whole.components.schemas.Schedule.required).toEqual(["orders", "records", "extras"]);
  });

  test("asks for an Idempotency-Key exactly where the server does", async () => {
    const { paths } = await document();
    const { app } = makeApp();
    for (const [path, methods] of Object.entries<Record<string, { parameters: { name: string }[] }>>(paths))
      for (const method of ["post", "patch"] as const) {
        if (methods[method] === undefined) continue;
        const { body } = await request(app)
          [method](`/api${path.replaceAll(/\{\w+\}/g, "x")}`)
          .send({});
        const described = methods[method].parameters.some(({ name }) => name === "Idempotency-Key");
        expect([path, body.type === "/problems/key-missing"]).toEqual([path, described]);
      }
  });
});

describe("/api/docs", () => {
  test("is a page with every route, the caution, and a style of our own", async () => {
    const { app } = makeApp();
    const { text, headers } = await request(app).get("/api/docs").expect(200);
    expect(headers["content-type"]).toBe("text/html; charset=utf-8");
    expect(text).toContain(standingCaution.text);
    for (const path of Object.keys((await document()).paths)) expect(text).toContain(`/api${path}</code>`);
    // The content security policy allows neither inline script nor inline style.
    expect(text).not.toMatch(/<script|<style|\sstyle=|\son\w+=/);
    expect(text).not.toContain("[object Object]");
    const style = await request(app).get("/api/docs.css").expect(200);
    expect(style.headers["content-type"]).toBe("text/css; charset=utf-8");
  });

  test("has no link to a shape that is not on it", async () => {
    const { text } = await request(makeApp().app).get("/api/docs");
    const targets = new Set([...text.matchAll(/id="(\w+)"/g)].map(([, id]) => id));
    for (const [, target] of text.matchAll(/href="#(\w+)"/g)) expect(targets).toContain(target);
  });
});
