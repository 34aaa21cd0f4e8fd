import { statSync } from "node:fs";
import type { Database } from "better-sqlite3";
import { DatabaseGoneError } from "./store-errors.ts";

/**
 * A check that the file that was opened is still the one at its path. SQLite goes on writing to a file
 * that was deleted or replaced while it was open: every save would be acknowledged, and gone at the end.
 *
 * @returns a function that throws DatabaseGoneError; looking at a path takes some microseconds and no lock
 */
export function fileInPlace(db: Database): () => void {
  if (db.memory) return () => undefined;
  const opened = identityOf(db.name);
  return () => {
    if (opened === undefined || identityOf(db.name) !== opened) throw new DatabaseGoneError();
  };
}

function identityOf(path: string): string | undefined {
  const found = statSync(path, { bigint: true, throwIfNoEntry: false });
  return found && `${found.dev} ${found.ino}`;
}
