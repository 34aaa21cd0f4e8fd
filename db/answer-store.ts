import type { Database } from "better-sqlite3";
import type { z } from "zod";
import type { Intention } from "./once.ts";
import { KeyReusedError } from "./store-errors.ts";

/** What writes answered, so that a retry costs nothing and is never judged by what came after it. */
export interface AnswerStore {
  /** The answer of the first try; undefined if this key is new. */
  find<Answer>(intention: Intention, schema: z.ZodType<Answer>): Promise<Answer | undefined>;
  /** Forgets answers older than an instant. */
  forgetBefore(instant: string): Promise<void>;
}

export function sqliteAnswerStore(db: Database): AnswerStore {
  const byKey = db.prepare<[string], { fingerprint: string; answer: string }>(
    "SELECT fingerprint, answer FROM answered_write WHERE key = ?",
  );
  const forget = db.prepare<[string]>("DELETE FROM answered_write WHERE answered_at < ?");
  return {
    async find(intention, schema) {
      const first = byKey.get(intention.key);
      if (first === undefined) return undefined;
      if (first.fingerprint !== intention.fingerprint) throw new KeyReusedError();
      return schema.parse(JSON.parse(first.answer));
    },
    async forgetBefore(instant) {
      db.transaction(() => forget.run(instant)).immediate();
    },
  };
}
