import { copyFileSync, mkdtempSync, renameSync, rmSync, unlinkSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import request from "supertest";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { closeDatabase, openDatabase } from "../../db/open-database.ts";
import { sqliteStores } from "../../db/stores.ts";
import { makeApp, write } from "../server/support/make-app.ts";
import { caseDraft } from "../server/support/samples.ts";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "ebbline-place-"));
});
afterEach(() => rmSync(folder, { recursive: true }));

// Once a save into a deleted file was acknowledged, and gone with the program.
describe("a database file that is open", () => {
  test.for([
    { name: "deleted", spoil: (file: string) => unlinkSync(file) },
    { name: "moved", spoil: (file: string) => renameSync(file, `${file}.old`) },
    {
      name: "replaced by a copy",
      spoil: (file: string) => {
        copyFileSync(file, `${file}.copy`);
        renameSync(`${file}.copy`, file);
      },
    },
  ])("and was $name takes no more writes, and says so", async ({ spoil }) => {
    const file = join(folder, "a.sqlite");
    const db = openDatabase(file);
    const { app } = makeApp({ stores: sqliteStores(db) });
    await write(app, "post", "/api/cases", caseDraft).expect(201);
    await request(app).get("/api/ready").expect(200);
    spoil(file);
    const { body } = await write(app, "post", "/api/cases", caseDraft).expect(503);
    expect(body).toMatchObject({
      type: "/problems/database-gone",
      detail: "put the database file back where it was, then start the program again",
    });
    await request(app).get("/api/ready").expect(503);
    expect((await request(app).get("/api/cases").expect(200)).body.cases).toHaveLength(1);
    closeDatabase(db);
  });
});
