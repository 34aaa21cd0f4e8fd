import type { Database } from "better-sqlite3";
import { type CaseId, type RegimenId, Revision, type RevisionId } from "../shared/contract/case.ts";
import { type Intention, onceIn } from "./once.ts";
import { canonicalJson, contentHashOf, sealOf } from "./seal.ts";
import { AlteredRowError, NotFoundError, StaleError } from "./store-errors.ts";

/** What a writer knows of a revision before it has its number. */
export type NewRevision = Omit<Revision, "number" | "contentHash">;

export interface RevisionStore {
  find(id: RevisionId): Promise<Revision | undefined>;
  /** Newest first. */
  listOfRegimen(regimenId: RegimenId): Promise<Revision[]>;
  /** The newest revision of each regimen of a case; none for a regimen without any. */
  latestOfCase(caseId: CaseId): Promise<Revision[]>;
  /**
   * Saves the next revision of a regimen.
   *
   * @param basedOnNumber the newest number the author had seen, 0 for none
   * @throws {NotFoundError} if the case has no such regimen
   * @throws {StaleError} if somebody saved a newer one
   */
  add(intention: Intention, basedOnNumber: number, made: NewRevision): Promise<Revision>;
}

interface RevisionRow {
  id: string;
  case_id: string;
  regimen_id: string;
  number: number;
  created_at: string;
  reason: string;
  prepared_by: string;
  content: string;
  content_hash: string;
  largest_difference_mg_per_l: number;
  largest_difference_at_h: number;
  largest_level_mg_per_l: number;
  relative_difference: number;
  points_compared: number;
  seal: string;
}

const columns = `id, case_id, regimen_id, number, created_at, reason, prepared_by, content, content_hash, largest_difference_mg_per_l,
  largest_difference_at_h, largest_level_mg_per_l, relative_difference, points_compared, seal`;

export function sqliteRevisionStore(db: Database): RevisionStore {
  const once = onceIn(db);
  const byId = db.prepare<[string], RevisionRow>(`SELECT ${columns} FROM revision WHERE id = ?`);
  const ofRegimen = db.prepare<[string], RevisionRow>(
    `SELECT ${columns} FROM revision WHERE regimen_id = ? ORDER BY number DESC`,
  );
  const latest = db.prepare<[string], RevisionRow>(
    `SELECT ${columns} FROM revision WHERE case_id = ?
       AND number = (SELECT MAX(other.number) FROM revision AS other WHERE other.regimen_id = revision.regimen_id)`,
  );
  const newestNumber = db
    .prepare<[string], number>("SELECT COALESCE(MAX(number), 0) FROM revision WHERE regimen_id = ?")
    .pluck();
  const regimenIsThere = db.prepare<[string, string]>("SELECT 1 FROM regimen WHERE id = ? AND case_id = ?");
  const insert = revisionInsert(db);
  return {
    async find(id) {
      const row = byId.get(id);
      return row && fromRow(row);
    },
    async listOfRegimen(regimenId) {
      return ofRegimen.all(regimenId).map(fromRow);
    },
    async latestOfCase(caseId) {
      return latest.all(caseId).map(fromRow);
    },
    async add(intention, basedOnNumber, made) {
      return once(intention, Revision, () => {
        if (regimenIsThere.get(made.regimenId, made.caseId) === undefined) throw new NotFoundError("regimen");
        const newest = newestNumber.get(made.regimenId)!;
        if (newest !== basedOnNumber) throw new StaleError("regimen", basedOnNumber, newest);
        const numbered = { ...made, number: newest + 1 };
        return insert({ ...numbered, contentHash: contentHashOf(numbered) });
      });
    },
  };
}

/** Writes one revision within a transaction that the caller has begun. */
export function revisionInsert(db: Database): (made: Revision) => Revision {
  const insert = db.prepare<[RevisionRow]>(
    `INSERT INTO revision (${columns}) VALUES (@id, @case_id, @regimen_id, @number, @created_at, @reason, @prepared_by, @content, @content_hash,
       @largest_difference_mg_per_l, @largest_difference_at_h, @largest_level_mg_per_l, @relative_difference, @points_compared, @seal)`,
  );
  return (made) => {
    insert.run(toRow(made));
    return made;
  };
}

function toRow(revision: Revision): RevisionRow {
  const { secondOpinion } = revision;
  return {
    id: revision.id,
    case_id: revision.caseId,
    regimen_id: revision.regimenId,
    number: revision.number,
    created_at: revision.createdAt,
    reason: revision.reason,
    prepared_by: revision.preparedBy,
    content: canonicalJson(revision.content),
    content_hash: revision.contentHash,
    largest_difference_mg_per_l: secondOpinion.largestDifferenceMgPerL,
    largest_difference_at_h: secondOpinion.atH,
    largest_level_mg_per_l: secondOpinion.largestLevelMgPerL,
    relative_difference: secondOpinion.relative,
    points_compared: secondOpinion.points,
    seal: outerSeal(revision),
  };
}

/**
 * The hash is over what the row says, before the contract is asked: filling in a default of today's
 * contract must not be able to hide or to fake a change.
 */
function fromRow(row: RevisionRow): Revision {
  const stored = {
    id: row.id,
    caseId: row.case_id,
    regimenId: row.regimen_id,
    number: row.number,
    createdAt: row.created_at,
    reason: row.reason,
    preparedBy: row.prepared_by,
    content: JSON.parse(row.content) as Revision["content"],
    contentHash: row.content_hash,
    secondOpinion: {
      largestDifferenceMgPerL: row.largest_difference_mg_per_l,
      atH: row.largest_difference_at_h,
      largestLevelMgPerL: row.largest_level_mg_per_l,
      relative: row.relative_difference,
      points: row.points_compared,
    },
  };
  if (contentHashOf(stored) !== row.content_hash || outerSeal(stored) !== row.seal)
    throw new AlteredRowError(`revision ${row.number} of regimen ${row.regimen_id}`);
  return Revision.parse(stored);
}

/** Covers what the content hash leaves out: where the revision belongs and what its second opinion was. */
function outerSeal({
  id,
  caseId,
  regimenId,
  contentHash,
  secondOpinion,
}: Record<"id" | "caseId" | "regimenId" | "contentHash", string> & Pick<Revision, "secondOpinion">): string {
  return sealOf({ id, caseId, regimenId, contentHash, secondOpinion });
}
