import type { Database } from "better-sqlite3";
import type { z } from "zod";
import { fileInPlace } from "./file-in-place.ts";
import { KeyReusedError } from "./store-errors.ts";

/** One wish to write, as its client names it: the same key again is the same wish. */
export interface Intention {
  /** UUID made by the client. */
  readonly key: string;
  /** SHA-256 over method, path and body, so that a key cannot stand for two requests. */
  readonly fingerprint: string;
  /** When it was asked for by the server's clock; what it writes may bear another date. */
  readonly at: string;
}

/** Carries a write out once, and answers a retry with what the first try answered. */
export type Once = <Answer>(intention: Intention, answer: z.ZodType<Answer>, work: () => Answer) => Answer;

/**
 * The work and the record of its answer are one transaction, and the lock is taken before the key is
 * looked up, so neither a lost answer nor a kill nor a second process can make the work happen twice.
 *
 * @returns a function that throws KeyReusedError where the key came with another request, and
 *          DatabaseGoneError where the file is no longer the one that was opened
 */
export function onceIn(db: Database): Once {
  const known = db.prepare<[string], { fingerprint: string; answer: string }>(
    "SELECT fingerprint, answer FROM answered_write WHERE key = ?",
  );
  const keep = db.prepare<[string, string, string, string]>(
    "INSERT INTO answered_write (key, fingerprint, answer, answered_at) VALUES (?, ?, ?, ?)",
  );
  const checkFile = fileInPlace(db);
  return (intention, schema, work) => {
    checkFile();
    return db
      .transaction(() => {
        const first = known.get(intention.key);
        if (first !== undefined) {
          if (first.fingerprint !== intention.fingerprint) throw new KeyReusedError();
          return schema.parse(JSON.parse(first.answer));
        }
        const answer = work();
        keep.run(intention.key, intention.fingerprint, JSON.stringify(answer), intention.at);
        return answer;
      })
      .immediate();
  };
}
