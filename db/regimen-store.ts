import type { Database } from "better-sqlite3";
import { type CaseId, Regimen, type RegimenChange, type RegimenId } from "../shared/contract/case.ts";
import { counts } from "../shared/contract/limits.ts";
import { type Intention, onceIn } from "./once.ts";
import { sealOf } from "./seal.ts";
import { AlteredRowError, NotFoundError, TooManyAlternativesError } from "./store-errors.ts";

/** What a regimen is made of; how many revisions it has is counted, never stored twice. */
export type NewRegimen = Omit<Regimen, "latestRevisionNumber">;

export interface RegimenStore {
  /** In the order they were made, retired ones too. */
  listOfCase(caseId: CaseId): Promise<Regimen[]>;
  find(caseId: CaseId, id: RegimenId): Promise<Regimen | undefined>;
  /**
   * @throws {NotFoundError} if there is no such case
   * @throws {TooManyAlternativesError} if the case is full
   */
  add(intention: Intention, made: NewRegimen): Promise<Regimen>;
  /** @throws {NotFoundError | TooManyAlternativesError} as above; taking a retired one up again counts too */
  change(intention: Intention, caseId: CaseId, id: RegimenId, change: RegimenChange): Promise<Regimen>;
}

interface RegimenRow {
  id: string;
  case_id: string;
  position: number;
  label: string;
  retired: number;
  created_at: string;
  seal: string;
}

const select = `SELECT id, case_id, position, label, retired, created_at, seal,
  (SELECT COALESCE(MAX(number), 0) FROM revision WHERE revision.regimen_id = regimen.id) AS latest_revision_number FROM regimen`;

export function sqliteRegimenStore(db: Database): RegimenStore {
  const once = onceIn(db);
  const ofCase = db.prepare<[string], StoredRegimen>(`${select} WHERE case_id = ? ORDER BY position`);
  const byId = db.prepare<[string, string], StoredRegimen>(`${select} WHERE id = ? AND case_id = ?`);
  const caseIsThere = db.prepare<[string]>("SELECT 1 FROM case_record WHERE id = ?");
  const countActive = db
    .prepare<[string], number>("SELECT COUNT(*) FROM regimen WHERE case_id = ? AND retired = 0")
    .pluck();
  const update = db.prepare<[RegimenRow]>(
    "UPDATE regimen SET label = @label, retired = @retired, seal = @seal WHERE id = @id",
  );
  const insert = regimenInsert(db);
  const refuseIfFull = (caseId: string) => {
    if (!(countActive.get(caseId)! < counts.alternatives)) throw new TooManyAlternativesError(counts.alternatives);
  };
  return {
    async listOfCase(caseId) {
      return ofCase.all(caseId).map(fromRow);
    },
    async find(caseId, id) {
      const row = byId.get(id, caseId);
      return row && fromRow(row);
    },
    async add(intention, made) {
      return once(intention, Regimen, () => {
        if (caseIsThere.get(made.caseId) === undefined) throw new NotFoundError("case");
        refuseIfFull(made.caseId);
        return insert(made);
      });
    },
    async change(intention, caseId, id, change) {
      return once(intention, Regimen, () => {
        const row = byId.get(id, caseId);
        if (row === undefined) throw new NotFoundError("regimen");
        const before = fromRow(row);
        if (before.retired && change.retired === false) refuseIfFull(caseId);
        const changed = Regimen.parse({ ...before, ...change });
        update.run(toRow(changed, row.position));
        return changed;
      });
    },
  };
}

/** Writes one regimen at the end of its case, within a transaction that the caller has begun. */
export function regimenInsert(db: Database): (made: NewRegimen) => Regimen {
  const nextPosition = db
    .prepare<[string], number>("SELECT COALESCE(MAX(position), 0) + 1 FROM regimen WHERE case_id = ?")
    .pluck();
  const insert = db.prepare<[RegimenRow]>(
    "INSERT INTO regimen (id, case_id, position, label, retired, created_at, seal) VALUES (@id, @case_id, @position, @label, @retired, @created_at, @seal)",
  );
  return (made) => {
    insert.run(toRow(made, nextPosition.get(made.caseId)!));
    return { ...made, latestRevisionNumber: 0 };
  };
}

type StoredRegimen = RegimenRow & { latest_revision_number: number };

function toRow({ id, caseId, label, retired, createdAt }: NewRegimen, position: number): RegimenRow {
  return {
    id,
    case_id: caseId,
    position,
    label,
    retired: retired ? 1 : 0,
    created_at: createdAt,
    seal: sealOf({ id, caseId, position, label, retired, createdAt }),
  };
}

function fromRow(row: StoredRegimen): Regimen {
  const stored = {
    id: row.id,
    caseId: row.case_id,
    label: row.label,
    retired: row.retired === 1,
    createdAt: row.created_at,
  };
  if (sealOf({ ...stored, position: row.position }) !== row.seal) throw new AlteredRowError(`regimen ${row.id}`);
  return Regimen.parse({ ...stored, latestRevisionNumber: row.latest_revision_number });
}
