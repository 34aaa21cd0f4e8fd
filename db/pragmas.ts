import type { Database } from "better-sqlite3";
import { DatabaseRefused } from "./database-refused.ts";

interface Setting {
  readonly name: string;
  readonly set: string;
  /** What SQLite answers when asked. A database in memory has no log and no mapped file. */
  readonly answers: readonly unknown[];
}

/**
 * Settings that hold for one connection (journal_mode stays in the file). The reasons:
 * WAL lets readers go on while one writes; FULL syncs before a commit is acknowledged, which WAL does not
 * do by the driver's default; recursive_triggers makes REPLACE meet the triggers that keep revisions;
 * trusted_schema, cell_size_check and mmap_size distrust a tampered file; secure_delete and temp_store
 * leave no patient data behind; the limits keep the log from growing for ever.
 *
 * Source: sqlite.org/pragma.html; the driver's defaults were measured on better-sqlite3 12.11.1.
 */
const settings: readonly Setting[] = [
  { name: "busy_timeout", set: "5000", answers: [5000] },
  { name: "journal_mode", set: "WAL", answers: ["wal", "memory"] },
  { name: "synchronous", set: "FULL", answers: [2] },
  { name: "foreign_keys", set: "ON", answers: [1] },
  { name: "recursive_triggers", set: "ON", answers: [1] },
  { name: "trusted_schema", set: "OFF", answers: [0] },
  { name: "cell_size_check", set: "ON", answers: [1] },
  { name: "mmap_size", set: "0", answers: [0, undefined] },
  { name: "secure_delete", set: "ON", answers: [1] },
  { name: "temp_store", set: "MEMORY", answers: [2] },
  { name: "wal_autocheckpoint", set: "1000", answers: [1000] },
  { name: "journal_size_limit", set: "67108864", answers: [67108864] },
];

/**
 * Sets every pragma and reads it back.
 *
 * @throws {DatabaseRefused} naming the first one that did not take: a commit that is not synced must not be served
 */
export function applyPragmas(db: Database): void {
  for (const { name, set, answers } of settings) {
    patiently(() => db.pragma(`${name} = ${set}`));
    const answer: unknown = db.pragma(name, { simple: true });
    if (!answers.includes(answer))
      throw new DatabaseRefused("settings", `the database did not take ${name} = ${set}, it answers ${String(answer)}`);
  }
}

/**
 * The switch to WAL does not wait for another process by itself, whatever busy_timeout says: of two
 * programs that start together on a new file, one would be told SQLITE_BUSY at once.
 */
function patiently(work: () => void): void {
  const triesAt20Ms = 250;
  for (let tries = 1; ; tries++) {
    try {
      work();
      return;
    } catch (error) {
      const isBusy = error instanceof Error && "code" in error && String(error.code).startsWith("SQLITE_BUSY");
      if (!isBusy || tries >= triesAt20Ms) throw error;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 20);
    }
  }
}
