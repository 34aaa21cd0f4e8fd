import { randomUUID } from "node:crypto";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { Regimen } from "../../shared/contract/case.ts";
import { makeApp, makeCase, makeRegimen, write } from "./support/make-app.ts";

describe("alternatives of a case", () => {
  test("are at most six that are not retired", async () => {
    const { app } = makeApp();
    const { id } = await makeCase(app);
    const path = `/api/cases/${id}/regimens`;
    const made: Regimen[] = [];
    for (const label of ["A", "B", "C", "D", "E", "F"])
      made.push(Regimen.parse((await write(app, "post", path, { label }).expect(201)).body));
    expect((await write(app, "post", path, { label: "G" }).expect(422)).body.type).toBe(
      "/problems/too-many-alternatives",
    );
    await write(app, "patch", `${path}/${made[1]!.id}`, { retired: true }).expect(200);
    await write(app, "post", path, { label: "G" }).expect(201);
    // Taking a retired one up again needs room too.
    await write(app, "patch", `${path}/${made[1]!.id}`, { retired: false }).expect(422);
    const labels = (await request(app).get(path)).body.regimens.map(({ label }: Regimen) => label);
    expect(labels).toEqual(["A", "B", "C", "D", "E", "F", "G"]);
  });

  test("can be renamed without touching what was saved", async () => {
    const { app } = makeApp();
    const { id, caseId } = await makeRegimen(app);
    const { body } = await write(app, "patch", `/api/cases/${caseId}/regimens/${id}`, { label: "Renamed" }).expect(200);
    expect(body).toMatchObject({ id, label: "Renamed", retired: false });
  });

  test("are not found under another case or without one", async () => {
    const { app } = makeApp();
    const { id } = await makeRegimen(app);
    const other = await makeCase(app);
    await write(app, "patch", `/api/cases/${other.id}/regimens/${id}`, { label: "x" }).expect(404);
    await write(app, "post", `/api/cases/${randomUUID()}/regimens`, { label: "x" }).expect(404);
    await request(app).get(`/api/cases/${randomUUID()}/regimens`).expect(404);
  });
});
