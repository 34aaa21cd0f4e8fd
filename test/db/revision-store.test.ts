import { randomUUID } from "node:crypto";
import type { Database } from "better-sqlite3";
import { beforeEach, describe, expect, test } from "vitest";
import { openDatabase } from "../../db/open-database.ts";
import type { NewRevision } from "../../db/revision-store.ts";
import { canonicalJson, contentHashOf } from "../../db/seal.ts";
import { type Stores, sqliteStores } from "../../db/stores.ts";
import { Case, RegimenContent, RegimenId, RevisionId } from "../../shared/contract/case.ts";
import { caseDraft, content } from "../server/support/samples.ts";

const at = "2026-05-04T09:00:00Z";
const wish = () => ({ key: randomUUID(), fingerprint: "0".repeat(64), at });
const secondOpinion = { largestDifferenceMgPerL: 1e-12, atH: 3, largestLevelMgPerL: 12, relative: 1e-13, points: 40 };

let db: Database;
let stores: Stores;
let next: () => NewRevision;

beforeEach(async () => {
  db = openDatabase(":memory:");
  stores = sqliteStores(db);
  const made = Case.parse({
    ...caseDraft,
    id: randomUUID(),
    version: 1,
    archived: false,
    demo: false,
    createdAt: at,
    changedAt: at,
  });
  await stores.cases.add(wish(), made);
  const regimen = await stores.regimens.add(wish(), {
    id: RegimenId.parse(randomUUID()),
    caseId: made.id,
    label: "A",
    retired: false,
    createdAt: at,
  });
  next = () => ({
    id: RevisionId.parse(randomUUID()),
    caseId: made.id,
    regimenId: regimen.id,
    createdAt: at,
    reason: "A test",
    preparedBy: "B",
    content: RegimenContent.parse(content),
    secondOpinion,
  });
});

describe("a revision", () => {
  test("comes back as it went in", async () => {
    const saved = await stores.revisions.add(wish(), 0, next());
    expect(await stores.revisions.find(saved.id)).toEqual(saved);
    expect(saved.contentHash).toBe(contentHashOf(saved));
  });

  test.for([
    "UPDATE revision SET reason = 'Another'",
    "DELETE FROM revision",
    "UPDATE OR REPLACE revision SET number = 2",
  ])("cannot be changed or deleted: %s", async (sql) => {
    await stores.revisions.add(wish(), 0, next());
    expect(() => db.exec(sql)).toThrow(/a revision is never (changed|deleted)/);
  });

  test("cannot be replaced either, which a trigger alone would not see", async () => {
    const { id } = await stores.revisions.add(wish(), 0, next());
    expect(() => db.exec(`INSERT OR REPLACE INTO revision SELECT * FROM revision WHERE id = '${id}'`)).toThrow(
      "a revision is never deleted",
    );
  });

  test.for([
    { column: "content", value: canonicalJson({ ...content, regimenLabel: "Every 6 h" }) },
    { column: "reason", value: "Another reason" },
    { column: "prepared_by", value: "Somebody else" },
    { column: "created_at", value: "2026-05-04T09:00:01Z" },
    { column: "content_hash", value: "0".repeat(64) },
    { column: "relative_difference", value: 1e-14 },
    { column: "largest_level_mg_per_l", value: 12.000000000000002 },
    { column: "points_compared", value: 41 },
    { column: "seal", value: "0".repeat(64) },
  ])("is refused by name once its $column was changed in the file", async ({ column, value }) => {
    const { id, regimenId } = await stores.revisions.add(wish(), 0, next());
    db.exec("DROP TRIGGER revision_never_changes");
    db.prepare(`UPDATE revision SET ${column} = ?`).run(value);
    await expect(stores.revisions.find(id)).rejects.toThrow(
      `revision 1 of regimen ${regimenId} is not as it was stored`,
    );
  });

  test("that stands under another regimen than it was saved under is refused", async () => {
    const { id, caseId } = await stores.revisions.add(wish(), 0, next());
    const other = await stores.regimens.add(wish(), {
      id: RegimenId.parse(randomUUID()),
      caseId,
      label: "B",
      retired: false,
      createdAt: at,
    });
    db.exec("DROP TRIGGER revision_never_changes");
    db.prepare("UPDATE revision SET regimen_id = ?").run(other.id);
    await expect(stores.revisions.find(id)).rejects.toThrow("is not as it was stored");
  });

  test("cannot name a regimen of another case", async () => {
    await expect(
      stores.revisions.add(wish(), 0, { ...next(), caseId: Case.shape.id.parse(randomUUID()) }),
    ).rejects.toThrow("there is no regimen");
  });
});

describe("what the driver binds as NULL without a word", () => {
  test.for([
    { name: "NaN", value: Number.NaN },
    { name: "undefined", value: undefined },
  ])("$name dies at the NOT NULL, and nothing of the write is kept", async ({ value }) => {
    expect(db.prepare("SELECT ? IS NULL").pluck().get(value)).toBe(1);
    const broken = { ...next(), secondOpinion: { ...secondOpinion, relative: 0 } };
    const { id, caseId, regimenId } = broken;
    const insert = () =>
      db
        .prepare(
          `INSERT INTO revision (id, case_id, regimen_id, number, created_at, reason, prepared_by, content, content_hash, largest_difference_mg_per_l,
             largest_difference_at_h, largest_level_mg_per_l, relative_difference, points_compared, seal) VALUES (?, ?, ?, 1, ?, 'why', 'who', '{}', ?, ?, 0, 0, 0, 1, ?)`,
        )
        .run(id, caseId, regimenId, at, "0".repeat(64), value, "0".repeat(64));
    expect(insert).toThrow("NOT NULL constraint failed: revision.largest_difference_mg_per_l");
    expect(await stores.revisions.listOfRegimen(regimenId)).toEqual([]);
  });

  test("a level that is NaN is refused before it is hashed", async () => {
    const broken = { ...next(), secondOpinion: { ...secondOpinion, relative: Number.NaN } };
    await expect(stores.revisions.add(wish(), 0, broken)).rejects.toThrow();
    expect(await stores.revisions.listOfRegimen(broken.regimenId)).toEqual([]);
  });
});

describe("a write and the record of its answer", () => {
  test("are one transaction: where the second fails, the first is undone", async () => {
    db.exec("CREATE TRIGGER no_room BEFORE INSERT ON answered_write BEGIN SELECT RAISE (ABORT, 'no room'); END");
    const revision = next();
    await expect(stores.revisions.add(wish(), 0, revision)).rejects.toThrow("no room");
    expect(await stores.revisions.listOfRegimen(revision.regimenId)).toEqual([]);
  });

  test("are all or nothing wherever the disk runs full", async () => {
    const pages = db.pragma("page_count", { simple: true }) as number;
    db.pragma(`max_page_count = ${pages + 2}`);
    let saved = 0;
    const { regimenId } = next();
    for (let round = 0; round < 200; round++) {
      const outcome = await stores.revisions.add(wish(), saved, next()).then(
        () => "saved",
        (error: { code: string }) => error.code,
      );
      if (outcome === "saved") saved++;
      else expect(outcome).toBe("SQLITE_FULL");
      const kept = db
        .prepare(
          "SELECT (SELECT COUNT(*) FROM revision) AS revisions, (SELECT COUNT(*) FROM answered_write) - 2 AS answers",
        )
        .get();
      expect(kept).toEqual({ revisions: saved, answers: saved });
      if (outcome !== "saved") break;
    }
    expect(saved).toBeLessThan(200);
    // What is there can still be read, and saving goes on once there is room.
    expect(await stores.revisions.listOfRegimen(regimenId)).toHaveLength(saved);
    db.pragma("max_page_count = 1000000");
    await stores.revisions.add(wish(), saved, next());
  });

  test("are forgotten once they are older than any retry, and only then", async () => {
    const early = wish();
    const first = await stores.revisions.add(early, 0, next());
    await stores.answers.forgetBefore("2026-05-04T08:59:59Z");
    expect(await stores.revisions.add(early, 0, next())).toEqual(first);
    await stores.answers.forgetBefore("2026-05-04T09:00:01Z");
    await expect(stores.revisions.add(early, 0, next())).rejects.toThrow("you had seen 0, the newest is 1");
  });
});
