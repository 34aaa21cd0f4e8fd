import { randomUUID } from "node:crypto";
import { Writable } from "node:stream";
import type { Database } from "better-sqlite3";
import type { Express } from "express";
import request from "supertest";
import { openDatabase } from "../../../db/open-database.ts";
import { sqliteStores } from "../../../db/stores.ts";
import { createApp } from "../../../server/app.ts";
import type { AppNeeds } from "../../../server/app-needs.ts";
import { makeLogger } from "../../../server/logger.ts";
import { answerQuestion } from "../../../server/predictions/answer-question.ts";
import { appraise } from "../../../server/revisions/appraise.ts";
import { writeSheet } from "../../../server/sheet/sheet.ts";
import type { Case, Regimen, Revision } from "../../../shared/contract/case.ts";
import { caseDraft, draft } from "./samples.ts";

export const now = "2026-05-04T09:00:00.000Z";

export interface Made {
  readonly app: Express;
  readonly db: Database;
  readonly needs: AppNeeds;
  /** Lines that were logged so far. */
  readonly log: readonly string[];
  /** Reasons for which the server gave up. */
  readonly gaveUp: readonly string[];
}

/** The real app over a real database in memory, with a fixed clock. */
export function makeApp(changes: Partial<AppNeeds> = {}): Made {
  const db = openDatabase(":memory:");
  const log: string[] = [];
  const gaveUp: string[] = [];
  const lines = new Writable({
    write(chunk, _encoding, done) {
      log.push(String(chunk));
      done();
    },
  });
  const needs: AppNeeds = {
    stores: sqliteStores(db),
    clock: () => now,
    ids: randomUUID,
    logger: makeLogger("trace", lines),
    writeSheet,
    calculate: async (question) => answerQuestion(question),
    appraise: async (content) => appraise(content),
    settings: { host: "127.0.0.1", publicNames: [], transport: "plain", requestsPerMinute: 1_000_000 },
    giveUp: (why) => gaveUp.push(why),
    ...changes,
  };
  return { app: createApp(needs), db, needs, log, gaveUp };
}

/** A write with a key of its own, or with the given one. */
export function write(
  app: Express,
  method: "post" | "patch",
  path: string,
  body: unknown,
  key: string = randomUUID(),
): request.Test {
  return request(app)
    [method](path)
    .set("Idempotency-Key", key)
    .send(body as object);
}

export async function makeCase(app: Express): Promise<Case> {
  const { body } = await write(app, "post", "/api/cases", caseDraft).expect(201);
  return body as Case;
}

export async function makeRegimen(app: Express, label = "Every 8 h"): Promise<Regimen> {
  const { id } = await makeCase(app);
  const { body } = await write(app, "post", `/api/cases/${id}/regimens`, { label }).expect(201);
  return body as Regimen;
}

export async function makeRevision(app: Express): Promise<Revision> {
  const { id, caseId } = await makeRegimen(app);
  const { body } = await write(app, "post", `/api/cases/${caseId}/regimens/${id}/revisions`, draft).expect(201);
  return body as Revision;
}
