import type { Database } from "better-sqlite3";

/** Things done once in the life of a file. */
export interface MilestoneStore {
  isReached(name: string): Promise<boolean>;
  reach(name: string, at: string): Promise<void>;
}

export function sqliteMilestoneStore(db: Database): MilestoneStore {
  const find = db.prepare<[string]>("SELECT 1 FROM milestone WHERE name = ?");
  const keep = db.prepare<[string, string]>(
    "INSERT INTO milestone (name, reached_at) VALUES (?, ?) ON CONFLICT DO NOTHING",
  );
  return {
    async isReached(name) {
      return find.get(name) !== undefined;
    },
    async reach(name, at) {
      db.transaction(() => keep.run(name, at)).immediate();
    },
  };
}
