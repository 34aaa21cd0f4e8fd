import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, describe, expect, test } from "vitest";
import { type Migration, migrate, readMigrations } from "../../db/migrations.ts";
import { openDatabase } from "../../db/open-database.ts";
import { projectFolder } from "../../db/project-folder.ts";

const folder = () => {
  const made = mkdtempSync(join(tmpdir(), "ebbline-migrations-"));
  folders.push(made);
  return made;
};
const folders: string[] = [];
afterEach(() => {
  for (const made of folders.splice(0)) rmSync(made, { recursive: true });
});

/** A database that has had the given files. */
function migrated(files: Record<string, string>) {
  const migrations = inFolder(files);
  return { db: openDatabase(":memory:", migrations), migrations };
}

function inFolder(files: Record<string, string>): Migration[] {
  const made = folder();
  for (const [name, sql] of Object.entries(files)) writeFileSync(join(made, name), sql);
  return readMigrations(made);
}

const first = { "0001-one.sql": "-- Why: a test.\nCREATE TABLE one (a INTEGER NOT NULL) STRICT;" };
const second = {
  "0002-two.sql":
    "-- Why: a test; with a semicolon.\nCREATE TABLE two (b TEXT NOT NULL DEFAULT ';') STRICT; INSERT INTO two DEFAULT VALUES;",
};

describe("migrations of the program", () => {
  test("are in order, each opening with its reason", () => {
    const all = readMigrations(join(projectFolder(), "db", "migrations"));
    expect(all.map(({ number }) => number)).toEqual(all.map((_, index) => index + 1));
    expect(all.length).toBeGreaterThan(0);
  });

  test("make STRICT tables only", () => {
    const db = openDatabase(":memory:");
    const tables = db.pragma("table_list") as { name: string; schema: string; strict: number }[];
    const ours = tables.filter(({ name, schema }) => schema === "main" && !name.startsWith("sqlite_"));
    expect(ours.map(({ name }) => name).sort()).toEqual([
      "answered_write",
      "case_record",
      "migration",
      "milestone",
      "regimen",
      "revision",
    ]);
    expect(ours.filter(({ strict }) => strict !== 1)).toEqual([]);
  });
});

describe("migrate", () => {
  test("brings a file up to date from where it is, each migration once", () => {
    const { db } = migrated(first);
    migrate(db, inFolder({ ...first, ...second }));
    migrate(db, inFolder({ ...first, ...second }));
    expect(db.prepare("SELECT b FROM two").pluck().all()).toEqual([";"]);
    expect(db.pragma("user_version", { simple: true })).toBe(2);
  });

  test("refuses a file that was changed after it was applied, naming it", () => {
    const { db } = migrated(first);
    const changed = inFolder({ "0001-one.sql": `${first["0001-one.sql"]} -- more` });
    expect(() => migrate(db, changed)).toThrow("migration 0001-one.sql was changed after this database had it");
  });

  test("refuses a file that is missing or renamed, naming it", () => {
    const { db } = migrated({ ...first, ...second });
    expect(() => migrate(db, inFolder(first))).toThrow(
      "migration 0002-two.sql, which this database has had, is missing from the program",
    );
    const renamed = inFolder({ ...first, "0002-other.sql": second["0002-two.sql"] });
    expect(() => migrate(db, renamed)).toThrow("0002-two.sql");
  });

  test("refuses a record that is out of order", () => {
    const { db, migrations } = migrated({ ...first, ...second });
    db.exec("DELETE FROM migration WHERE number = 1");
    expect(() => migrate(db, migrations)).toThrow("migration 0002-two.sql was recorded out of order");
  });

  test("leaves a file at the version before, when a migration fails half-way", () => {
    const { db } = migrated(first);
    const broken = inFolder({
      ...first,
      "0002-broken.sql": "-- Why: a test.\nCREATE TABLE two (b TEXT) STRICT; INSERT INTO nowhere VALUES (1);",
    });
    expect(() => migrate(db, broken)).toThrow("nowhere");
    expect(db.pragma("user_version", { simple: true })).toBe(1);
    expect(db.prepare("SELECT name FROM sqlite_schema WHERE name = 'two'").get()).toBeUndefined();
    migrate(db, inFolder({ ...first, ...second }));
  });
});

describe("readMigrations", () => {
  test.for([
    {
      name: "a gap",
      files: { "0002-two.sql": "-- Why: x" },
      message: "migration 0002-two.sql is out of order: number 1 is expected",
    },
    {
      name: "a number twice",
      files: { "0001-a.sql": "-- Why: x", "0001-b.sql": "-- Why: x" },
      message: "migration 0001-b.sql is out of order",
    },
    {
      name: "a name without a number",
      files: { "one.sql": "-- Why: x" },
      message: "migration one.sql is out of order",
    },
    {
      name: "no reason",
      files: { "0001-a.sql": "CREATE TABLE a (b)" },
      message: "migration 0001-a.sql does not open with its reason",
    },
  ])("refuses $name", ({ files, message }) => {
    expect(() => inFolder(files as Record<string, string>)).toThrow(message);
  });
});
