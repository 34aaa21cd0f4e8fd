import type { Database } from "better-sqlite3";
import { type AnswerStore, sqliteAnswerStore } from "./answer-store.ts";
import { type CaseStore, sqliteCaseStore } from "./case-store.ts";
import { fileInPlace } from "./file-in-place.ts";
import { type MilestoneStore, sqliteMilestoneStore } from "./milestone-store.ts";
import { checkWhole } from "./open-database.ts";
import { type RegimenStore, sqliteRegimenStore } from "./regimen-store.ts";
import { type RevisionStore, sqliteRevisionStore } from "./revision-store.ts";
import { sqliteWholeCaseStore, type WholeCaseStore } from "./whole-case-store.ts";

/** All doors to what is stored. */
export interface Stores {
  readonly cases: CaseStore;
  readonly regimens: RegimenStore;
  readonly revisions: RevisionStore;
  readonly wholeCases: WholeCaseStore;
  readonly answers: AnswerStore;
  readonly milestones: MilestoneStore;
  /** @throws {DatabaseGoneError} if the file was deleted or replaced since it was opened; quick */
  checkInPlace(): Promise<void>;
  /** @throws {DatabaseRefused} if what is stored is damaged; any error if it cannot be reached */
  checkWhole(): Promise<void>;
}

export function sqliteStores(db: Database): Stores {
  const checkFile = fileInPlace(db);
  return {
    cases: sqliteCaseStore(db),
    regimens: sqliteRegimenStore(db),
    revisions: sqliteRevisionStore(db),
    wholeCases: sqliteWholeCaseStore(db),
    answers: sqliteAnswerStore(db),
    milestones: sqliteMilestoneStore(db),
    async checkInPlace() {
      checkFile();
    },
    async checkWhole() {
      checkWhole(db);
    },
  };
}
