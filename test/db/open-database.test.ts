import { mkdtempSync, readFileSync, rmSync, statSync, truncateSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import Sqlite from "better-sqlite3";
import { afterAll, describe, expect, test } from "vitest";
import { DatabaseRefused } from "../../db/database-refused.ts";
import { readMigrations } from "../../db/migrations.ts";
import { applicationId, closeDatabase, openDatabase } from "../../db/open-database.ts";
import { applyPragmas } from "../../db/pragmas.ts";
import { projectFolder } from "../../db/project-folder.ts";

const folder = mkdtempSync(join(tmpdir(), "ebbline-open-"));
afterAll(() => rmSync(folder, { recursive: true }));
const newest = readMigrations(join(projectFolder(), "db", "migrations")).length;
const fileAt = (name: string) => join(folder, name);

function refusal(open: () => unknown): DatabaseRefused {
  try {
    open();
  } catch (error) {
    if (error instanceof DatabaseRefused) return error;
    throw error;
  }
  throw new Error("it was not refused");
}

describe("openDatabase", () => {
  test("sets what the record of a patient needs, which the driver does not", () => {
    const db = openDatabase(fileAt("settings.sqlite"));
    const settings = {
      journal_mode: "wal",
      synchronous: 2,
      foreign_keys: 1,
      recursive_triggers: 1,
      trusted_schema: 0,
      cell_size_check: 1,
      mmap_size: 0,
      secure_delete: 1,
      temp_store: 2,
      busy_timeout: 5000,
      wal_autocheckpoint: 1000,
      journal_size_limit: 67_108_864,
      application_id: applicationId,
      user_version: newest,
    };
    for (const [name, value] of Object.entries(settings))
      expect([name, db.pragma(name, { simple: true })]).toEqual([name, value]);
    closeDatabase(db);
  });

  test("refuses to go on where a setting does not take", () => {
    const db = openDatabase(":memory:");
    const stubborn = new Proxy(db, {
      get: (target, key) =>
        key === "pragma"
          ? (text: string, options: object) => (text === "synchronous" ? 1 : target.pragma(text, options))
          : Reflect.get(target, key),
    });
    const { reason, message } = refusal(() => applyPragmas(stubborn));
    expect([reason, message]).toEqual(["settings", "the database did not take synchronous = FULL, it answers 1"]);
  });

  test("tries again while another process holds the file: the switch to WAL does not wait by itself", () => {
    const db = openDatabase(":memory:");
    let busy = 3;
    const contended = new Proxy(db, {
      get: (target, key) =>
        key === "pragma"
          ? (text: string, options: object) => {
              if (text.startsWith("journal_mode =") && busy-- > 0)
                throw Object.assign(new Error(), { code: "SQLITE_BUSY" });
              return target.pragma(text, options);
            }
          : Reflect.get(target, key),
    });
    applyPragmas(contended);
    expect(busy).toBe(-1);
  });

  test("makes the file for its owner alone, and the folders above it", () => {
    const file = fileAt("deep/er/new.sqlite");
    closeDatabase(openDatabase(file));
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(statSync(fileAt("deep/er")).mode & 0o777).toBe(0o700);
  });

  test("opens its own file again", () => {
    const file = fileAt("again.sqlite");
    closeDatabase(openDatabase(file));
    closeDatabase(openDatabase(file));
  });

  test("refuses a file of another program and leaves it as it was", () => {
    const file = fileAt("foreign.sqlite");
    const other = new Sqlite(file);
    other.exec("CREATE TABLE theirs (a)");
    other.close();
    const before = readFileSync(file);
    expect(refusal(() => openDatabase(file)).reason).toBe("foreign");
    expect(readFileSync(file).equals(before)).toBe(true);
  });

  test("refuses a file that names another application, though it is empty", () => {
    const file = fileAt("named.sqlite");
    const other = new Sqlite(file);
    other.pragma("application_id = 77");
    other.close();
    expect(refusal(() => openDatabase(file)).reason).toBe("foreign");
  });

  test("refuses a file that is no database and leaves it as it was", () => {
    const file = fileAt("letter.sqlite");
    const text = "Dear colleague, ".repeat(100);
    writeFileSync(file, text);
    const { reason, message } = refusal(() => openDatabase(file));
    expect([reason, message]).toEqual(["foreign", "the file is not a database; it was left as it is"]);
    expect(readFileSync(file, "utf8")).toBe(text);
  });

  test("refuses a file of a newer release, naming both versions", () => {
    const file = fileAt("newer.sqlite");
    const db = openDatabase(file);
    db.pragma("user_version = 99");
    closeDatabase(db);
    const { reason, message } = refusal(() => openDatabase(file));
    expect(reason).toBe("newer");
    expect(message).toContain(`schema 99, this program knows ${newest}`);
  });

  test("refuses a file with a page overwritten", () => {
    const file = fileAt("damaged.sqlite");
    closeDatabase(openDatabase(file));
    const bytes = readFileSync(file);
    bytes.fill(0x5a, 4_096 * 3, 4_096 * 4);
    writeFileSync(file, bytes);
    expect(refusal(() => openDatabase(file)).reason).toBe("damaged");
  });

  test("refuses a file that was cut short", () => {
    const file = fileAt("cut.sqlite");
    closeDatabase(openDatabase(file));
    truncateSync(file, 4_096 * 2);
    expect(refusal(() => openDatabase(file)).reason).toBe("damaged");
  });

  test("refuses a file in which a row refers to one that is gone, which integrity_check does not see", () => {
    const file = fileAt("orphan.sqlite");
    const db = openDatabase(file);
    db.pragma("foreign_keys = OFF");
    db.exec(`INSERT INTO regimen (id, case_id, position, label, retired, created_at, seal)
      VALUES ('${"a".repeat(36)}', 'gone', 1, 'x', 0, '2026-05-04T09:00:00Z', '${"0".repeat(64)}')`);
    closeDatabase(db);
    expect(refusal(() => openDatabase(file)).message).toContain("a row refers to one that is gone");
  });

  test("says why a file cannot be reached", () => {
    expect(refusal(() => openDatabase(folder)).reason).toBe("unreachable");
    writeFileSync(fileAt("plain"), "");
    expect(refusal(() => openDatabase(join(fileAt("plain"), "x.sqlite"))).reason).toBe("unreachable");
  });
});
