import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { openDatabase } from "../../db/open-database.ts";
import { sqliteStores } from "../../db/stores.ts";
import { Case } from "../../shared/contract/case.ts";
import { caseDraft } from "../server/support/samples.ts";

const at = "2026-05-04T09:00:00Z";
const id = "00000000-0000-4000-8000-000000000001";
const wish = (last: string) => ({ key: `00000000-0000-4000-8000-00000000000${last}`, fingerprint: "0".repeat(64), at });

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "ebbline-two-"));
});
afterEach(() => rmSync(folder, { recursive: true }));

describe("two connections on one file", () => {
  test("see each other's writes, and of two changes from one version the second is refused", async () => {
    const file = join(folder, "a.sqlite");
    const [one, other] = [openDatabase(file), openDatabase(file)];
    const [first, second] = [sqliteStores(one), sqliteStores(other)];
    const made = Case.parse({
      ...caseDraft,
      id,
      version: 1,
      archived: false,
      demo: false,
      createdAt: at,
      changedAt: at,
    });
    await first.cases.add(wish("1"), made);
    await second.cases.change(wish("2"), made.id, { version: 1, label: "By the second" });
    await expect(first.cases.change(wish("3"), made.id, { version: 1, label: "By the first" })).rejects.toThrow(
      "you had seen 1, the newest is 2",
    );
    // A retry at the other process is recognised there too.
    expect(await first.cases.change(wish("2"), made.id, { version: 1, label: "By the second" })).toMatchObject({
      version: 2,
    });
    one.close();
    other.close();
  });

  test("take the write lock at the start: a deferred transaction that read first would fail at once", async () => {
    const file = join(folder, "b.sqlite");
    const [one, other] = [openDatabase(file), openDatabase(file)];
    const made = Case.parse({
      ...caseDraft,
      id,
      version: 1,
      archived: false,
      demo: false,
      createdAt: at,
      changedAt: at,
    });
    await sqliteStores(one).cases.add(wish("1"), made);

    // The trap itself, so that this test fails if it ever goes away and the rule with it.
    other.exec("BEGIN");
    other.prepare("SELECT version FROM case_record").get();
    one.exec(`INSERT INTO milestone VALUES ('first', '${at}')`);
    const startedAt = performance.now();
    expect(() => other.exec(`INSERT INTO milestone VALUES ('second', '${at}')`)).toThrow(
      expect.objectContaining({ code: "SQLITE_BUSY_SNAPSHOT" }),
    );
    expect(performance.now() - startedAt).toBeLessThan(1_000);
    other.exec("ROLLBACK");

    // The stores wait instead, and say so if the wait is in vain.
    other.pragma("busy_timeout = 100");
    one.exec("BEGIN IMMEDIATE");
    const change = sqliteStores(other).cases.change(wish("2"), made.id, { version: 1, label: "x" });
    await expect(change).rejects.toMatchObject({ code: "SQLITE_BUSY" });
    one.exec("COMMIT");
    expect(await sqliteStores(other).cases.change(wish("2"), made.id, { version: 1, label: "x" })).toMatchObject({
      version: 2,
    });
    one.close();
    other.close();
  });

  test("an async body in a transaction is refused by the driver, so a store cannot commit half", () => {
    const db = openDatabase(":memory:");
    expect(() => db.transaction(async () => db.exec("CREATE TABLE half (a)"))()).toThrow("cannot return a promise");
    expect(db.prepare("SELECT 1 FROM sqlite_schema WHERE name = 'half'").get()).toBeUndefined();
  });
});
