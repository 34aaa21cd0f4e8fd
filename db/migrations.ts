import { createHash } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import type { Database } from "better-sqlite3";
import { DatabaseRefused } from "./database-refused.ts";

export interface Migration {
  readonly number: number;
  readonly name: string;
  readonly sql: string;
  readonly sha256: string;
}

/**
 * The migrations of a folder, in order: 0001-..., 0002-..., without a gap.
 *
 * @throws {DatabaseRefused} naming a file that is out of order or does not say why it is there
 */
export function readMigrations(folder: string): Migration[] {
  const names = readdirSync(folder)
    .filter((name) => name.endsWith(".sql"))
    .sort();
  return names.map((name, index) => {
    const sql = readFileSync(join(folder, name), "utf8");
    const number = Number(/^(\d{4})-[a-z0-9-]+\.sql$/.exec(name)?.[1]);
    if (number !== index + 1)
      throw new DatabaseRefused("migrations", `migration ${name} is out of order: number ${index + 1} is expected`);
    if (!sql.startsWith("-- Why: "))
      throw new DatabaseRefused("migrations", `migration ${name} does not open with its reason`);
    return { number, name, sql, sha256: createHash("sha256").update(sql).digest("hex") };
  });
}

/**
 * Brings a file up to the newest migration and leaves one that is there already as it is. Each file goes
 * to SQLite whole, within a transaction of its own together with the record of it, so that a process
 * killed in between leaves a file at one version or the next. The lock is taken before the version is
 * read: of two processes that start on one file, the second finds the work done.
 *
 * @throws {DatabaseRefused} if a migration the file has had is missing, changed or out of order, naming it
 */
export function migrate(db: Database, migrations: readonly Migration[]): void {
  const record = `CREATE TABLE IF NOT EXISTS migration (
    number INTEGER NOT NULL PRIMARY KEY CHECK (number >= 1),
    name TEXT NOT NULL UNIQUE,
    sha256 TEXT NOT NULL CHECK (length(sha256) = 64),
    applied_at TEXT NOT NULL
  ) STRICT`;
  db.transaction(() => db.exec(record)).immediate();
  checkRecorded(db, migrations);
  for (const migration of migrations) db.transaction(() => applyOne(db, migration)).immediate();
}

function applyOne(db: Database, { number, name, sql, sha256 }: Migration): void {
  if (db.prepare("SELECT 1 FROM migration WHERE number = ?").get(number) !== undefined) return;
  db.exec(sql);
  db.prepare(
    "INSERT INTO migration (number, name, sha256, applied_at) VALUES (?, ?, ?, strftime('%Y-%m-%dT%H:%M:%SZ', 'now'))",
  ).run(number, name, sha256);
  db.pragma(`user_version = ${number}`);
}

function checkRecorded(db: Database, migrations: readonly Migration[]): void {
  const recorded = db
    .prepare<[], { number: number; name: string; sha256: string }>(
      "SELECT number, name, sha256 FROM migration ORDER BY number",
    )
    .all();
  recorded.forEach((had, index) => {
    const migration = migrations[index];
    if (had.number !== index + 1)
      throw new DatabaseRefused("migrations", `migration ${had.name} was recorded out of order`);
    if (migration === undefined || migration.name !== had.name)
      throw new DatabaseRefused(
        "migrations",
        `migration ${had.name}, which this database has had, is missing from the program`,
      );
    if (migration.sha256 !== had.sha256)
      throw new DatabaseRefused("migrations", `migration ${had.name} was changed after this database had it`);
  });
}
