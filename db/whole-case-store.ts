import type { Database } from "better-sqlite3";
import { Case, type Revision } from "../shared/contract/case.ts";
import { caseInsert } from "./case-store.ts";
import { type Intention, onceIn } from "./once.ts";
import { type NewRegimen, regimenInsert } from "./regimen-store.ts";
import { revisionInsert } from "./revision-store.ts";

/** A case with everything in it, as it comes from a file. */
export interface WholeCase {
  readonly case: Case;
  readonly regimens: readonly { readonly regimen: NewRegimen; readonly revisions: readonly Revision[] }[];
}

export interface WholeCaseStore {
  /** All of it or nothing. */
  add(intention: Intention, whole: WholeCase): Promise<Case>;
}

export function sqliteWholeCaseStore(db: Database): WholeCaseStore {
  const once = onceIn(db);
  const insertCase = caseInsert(db);
  const insertRegimen = regimenInsert(db);
  const insertRevision = revisionInsert(db);
  return {
    async add(intention, whole) {
      return once(intention, Case, () => {
        insertCase(whole.case);
        for (const { regimen, revisions } of whole.regimens) {
          insertRegimen(regimen);
          for (const revision of revisions) insertRevision(revision);
        }
        return whole.case;
      });
    },
  };
}
