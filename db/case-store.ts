import type { Database } from "better-sqlite3";
import { Case, type CaseChange, type CaseId } from "../shared/contract/case.ts";
import { type Intention, onceIn } from "./once.ts";
import { sealOf } from "./seal.ts";
import { AlteredRowError, NotFoundError, StaleError } from "./store-errors.ts";

export interface CaseStore {
  /** Newest change first. */
  list(archived: "none" | "only"): Promise<Case[]>;
  find(id: CaseId): Promise<Case | undefined>;
  add(intention: Intention, made: Case): Promise<Case>;
  /**
   * @throws {NotFoundError} if there is no such case
   * @throws {StaleError} if the change was made from an older version than the newest
   */
  change(intention: Intention, id: CaseId, change: CaseChange): Promise<Case>;
}

interface CaseRow {
  id: string;
  version: number;
  label: string;
  time_zone: string;
  notes: string;
  setting: string | null;
  archived: number;
  demo: number;
  created_at: string;
  changed_at: string;
  seal: string;
}

const columns = "id, version, label, time_zone, notes, setting, archived, demo, created_at, changed_at, seal";

export function sqliteCaseStore(db: Database): CaseStore {
  const once = onceIn(db);
  const byArchived = db.prepare<[number], CaseRow>(
    `SELECT ${columns} FROM case_record WHERE archived = ? ORDER BY changed_at DESC, id`,
  );
  const byId = db.prepare<[string], CaseRow>(`SELECT ${columns} FROM case_record WHERE id = ?`);
  const update = db.prepare<[CaseRow]>(
    `UPDATE case_record SET version = @version, label = @label, time_zone = @time_zone, notes = @notes, setting = @setting,
       archived = @archived, changed_at = @changed_at, seal = @seal WHERE id = @id`,
  );
  const insert = caseInsert(db);
  return {
    async list(archived) {
      return byArchived.all(archived === "only" ? 1 : 0).map(fromRow);
    },
    async find(id) {
      const row = byId.get(id);
      return row && fromRow(row);
    },
    async add(intention, made) {
      return once(intention, Case, () => insert(made));
    },
    async change(intention, id, change) {
      return once(intention, Case, () => {
        const row = byId.get(id);
        if (row === undefined) throw new NotFoundError("case");
        if (row.version !== change.version) throw new StaleError("case", change.version, row.version);
        const changed = Case.parse({ ...fromRow(row), ...change, version: row.version + 1, changedAt: intention.at });
        update.run(toRow(changed));
        return changed;
      });
    },
  };
}

/** Writes one case within a transaction that the caller has begun. */
export function caseInsert(db: Database): (made: Case) => Case {
  const insert = db.prepare<[CaseRow]>(
    `INSERT INTO case_record (${columns}) VALUES (@id, @version, @label, @time_zone, @notes, @setting, @archived, @demo, @created_at, @changed_at, @seal)`,
  );
  return (made) => {
    insert.run(toRow(made));
    return made;
  };
}

function toRow(kase: Case): CaseRow {
  return {
    id: kase.id,
    version: kase.version,
    label: kase.label,
    time_zone: kase.timeZone,
    notes: kase.notes,
    setting: kase.setting === undefined ? null : JSON.stringify(kase.setting),
    archived: kase.archived ? 1 : 0,
    demo: kase.demo ? 1 : 0,
    created_at: kase.createdAt,
    changed_at: kase.changedAt,
    seal: sealOf(kase),
  };
}

/** Parsed, not cast: a row that an older release wrote must still meet today's contract. */
function fromRow(row: CaseRow): Case {
  const stored = {
    id: row.id,
    version: row.version,
    label: row.label,
    timeZone: row.time_zone,
    notes: row.notes,
    ...(row.setting !== null && { setting: JSON.parse(row.setting) as unknown }),
    archived: row.archived === 1,
    demo: row.demo === 1,
    createdAt: row.created_at,
    changedAt: row.changed_at,
  };
  if (sealOf(stored) !== row.seal) throw new AlteredRowError(`case ${row.id}`);
  return Case.parse(stored);
}
