import type { Database } from "better-sqlite3";
import { describe, expect, test } from "vitest";
import { openDatabase } from "../../db/open-database.ts";
import { sqliteStores } from "../../db/stores.ts";

/** Every statement that the stores prepare. */
function statementsOfStores(db: Database): string[] {
  const statements: string[] = [];
  const watched = new Proxy(db, {
    get(target, key) {
      if (key !== "prepare") return Reflect.get(target, key);
      return (sql: string) => {
        statements.push(sql);
        return target.prepare(sql);
      };
    },
  });
  sqliteStores(watched);
  return [...new Set(statements)];
}

describe("no statement of a store", () => {
  const db = openDatabase(":memory:");
  const statements = statementsOfStores(db);

  test("is forgotten here", () => {
    expect(statements.length).toBeGreaterThan(20);
  });

  test.for(statements)("reads through a whole table: %s", (sql) => {
    const bound = (sql.match(/\?/g) ?? []).map(() => null);
    const named = Object.fromEntries([...sql.matchAll(/@(\w+)/g)].map(([, name]) => [name!, null]));
    const plan = db.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(...(bound.length > 0 ? bound : [named])) as {
      detail: string;
    }[];
    expect(plan.map(({ detail }) => detail).filter((detail) => detail.startsWith("SCAN"))).toEqual([]);
  });
});
