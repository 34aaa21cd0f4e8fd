import { closeSync, mkdirSync, openSync } from "node:fs";
import { dirname, join } from "node:path";
import Sqlite, { type Database } from "better-sqlite3";
import { DatabaseRefused } from "./database-refused.ts";
import { type Migration, migrate, readMigrations } from "./migrations.ts";
import { applyPragmas } from "./pragmas.ts";
import { projectFolder } from "./project-folder.ts";

/** "Ebbl" in ASCII: tells our files from other SQLite files. */
export const applicationId = 0x4562626c;

/** The first SQLite without the race in WAL reset that could corrupt a file (sqlite.org/wal.html, 3.51.3). */
const oldestSqlite = [3, 51, 3] as const;

/**
 * Opens our database, makes it where there is none, and brings it up to date. A file that is not ours is
 * never written to: it is looked at before anything is set.
 *
 * @param file       path, or ":memory:" for a test
 * @param migrations those of the program unless a test gives others
 * @throws {DatabaseRefused} saying what is wrong with the file
 */
export function openDatabase(
  file: string,
  migrations: readonly Migration[] = readMigrations(join(projectFolder(), "db", "migrations")),
): Database {
  const db = connect(file);
  try {
    checkSqlite(db);
    checkIdentity(db, migrations.length);
    applyPragmas(db);
    checkWhole(db);
    if (db.pragma("application_id", { simple: true }) !== applicationId) db.pragma(`application_id = ${applicationId}`);
    migrate(db, migrations);
    return db;
  } catch (error) {
    db.close();
    throw refusalOf(error);
  }
}

/** Leaves statistics for the next start and closes; the log is folded into the file by SQLite. */
export function closeDatabase(db: Database): void {
  db.pragma("optimize");
  db.close();
}

/**
 * Checks structure and references of the whole file.
 *
 * @throws {DatabaseRefused} if it is damaged
 */
export function checkWhole(db: Database): void {
  const found: unknown = db.pragma("integrity_check(1)", { simple: true });
  if (found !== "ok")
    throw new DatabaseRefused(
      "damaged",
      "the database file is damaged (integrity_check found a fault); restore it from a backup",
    );
  // integrity_check does not look at foreign keys.
  if ((db.pragma("foreign_key_check") as unknown[]).length > 0)
    throw new DatabaseRefused(
      "damaged",
      "the database file is damaged (a row refers to one that is gone); restore it from a backup",
    );
}

function connect(file: string): Database {
  try {
    if (file !== ":memory:") makePrivately(file);
    return new Sqlite(file);
  } catch (error) {
    throw new DatabaseRefused("unreachable", `the database file cannot be opened: ${codeOf(error)}`, { cause: error });
  }
}

/** Patient data: the folder and the file are made for their owner alone. */
function makePrivately(file: string): void {
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  closeSync(openSync(file, "a", 0o600));
}

function checkSqlite(db: Database): void {
  const version = db.prepare<[], string>("SELECT sqlite_version()").pluck().get()!;
  const parts = version.split(".").map(Number);
  const differs = oldestSqlite.findIndex((least, index) => parts[index] !== least);
  if (differs >= 0 && !(parts[differs]! > oldestSqlite[differs]!))
    throw new DatabaseRefused("settings", `SQLite must be ${oldestSqlite.join(".")} or later, this is ${version}`);
}

/** Ours, or empty. */
function checkIdentity(db: Database, newest: number): void {
  const id: unknown = db.pragma("application_id", { simple: true });
  const version = db.pragma("user_version", { simple: true }) as number;
  const isEmpty = db.prepare("SELECT 1 FROM sqlite_schema LIMIT 1").get() === undefined;
  if (id !== applicationId && !(id === 0 && version === 0 && isEmpty))
    throw new DatabaseRefused("foreign", "the file is a database of another program, or of none; it was left as it is");
  if (version > newest)
    throw new DatabaseRefused(
      "newer",
      `the database was written by a newer release (schema ${version}, this program knows ${newest}); update the program`,
    );
}

function refusalOf(error: unknown): unknown {
  const code = codeOf(error);
  if (code === "SQLITE_NOTADB")
    return new DatabaseRefused("foreign", "the file is not a database; it was left as it is", { cause: error });
  if (code.startsWith("SQLITE_CORRUPT"))
    return new DatabaseRefused("damaged", `the database file is damaged (${code}); restore it from a backup`, {
      cause: error,
    });
  if (code.startsWith("SQLITE_BUSY"))
    return new DatabaseRefused("unreachable", "another program holds the database file; stop it and try again", {
      cause: error,
    });
  if (
    code.startsWith("SQLITE_IOERR") ||
    code.startsWith("SQLITE_CANTOPEN") ||
    code.startsWith("SQLITE_READONLY") ||
    code === "SQLITE_FULL"
  )
    return new DatabaseRefused("unreachable", `the database file cannot be read and written: ${code}`, {
      cause: error,
    });
  return error;
}

function codeOf(error: unknown): string {
  return error instanceof Error && "code" in error ? String(error.code) : "unknown error";
}
