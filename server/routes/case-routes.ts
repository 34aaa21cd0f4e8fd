import { Router } from "express";
import { z } from "zod";
import type { CaseStore } from "../../db/case-store.ts";
import type { RegimenStore } from "../../db/regimen-store.ts";
import type { RevisionStore } from "../../db/revision-store.ts";
import { NotFoundError } from "../../db/store-errors.ts";
import { Case, CaseChange, CaseDraft, CaseId } from "../../shared/contract/case.ts";
import type { Clock, Ids } from "../app-needs.ts";
import { intentionOf } from "../intention.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read, readId } from "../read.ts";
import { revisionAnswer, withStanding } from "../with-cautions.ts";

export const CaseListQuery = z.strictObject({
  archived: z.enum(["none", "only"], { error: 'must be "none" or "only"' }).default("none"),
});

interface Needs {
  readonly stores: { readonly cases: CaseStore; readonly regimens: RegimenStore; readonly revisions: RevisionStore };
  readonly clock: Clock;
  readonly ids: Ids;
}

export function caseRoutes({ stores: { cases, regimens, revisions }, clock, ids }: Needs): Router {
  const router = Router();
  router
    .route("/cases")
    .get(async (request, response) => {
      const { archived } = read(CaseListQuery, request.query);
      response.json(withStanding({ cases: await cases.list(archived) }));
    })
    .post(jsonBody("usual"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const draft = read(CaseDraft, request.body);
      const now = intention.at;
      const made = Case.parse({
        ...draft,
        id: ids(),
        version: 1,
        archived: false,
        demo: false,
        createdAt: now,
        changedAt: now,
      });
      const kept = await cases.add(intention, made);
      response.status(201).location(`/api/cases/${kept.id}`).json(withStanding(kept));
    })
    .all(only("GET", "POST"));
  router
    .route("/cases/:caseId")
    .get(async (request, response) => {
      const id = readId(CaseId, request.params.caseId, "case");
      const found = await cases.find(id);
      if (found === undefined) throw new NotFoundError("case");
      const latest = new Map((await revisions.latestOfCase(id)).map((revision) => [revision.regimenId, revision]));
      const alternatives = (await regimens.listOfCase(id)).map((regimen) => {
        const newest = latest.get(regimen.id);
        return newest === undefined ? regimen : { ...regimen, latest: revisionAnswer(newest) };
      });
      response.json(withStanding({ case: found, regimens: alternatives }));
    })
    .patch(jsonBody("usual"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const id = readId(CaseId, request.params.caseId, "case");
      response.json(withStanding(await cases.change(intention, id, read(CaseChange, request.body))));
    })
    .all(only("GET", "PATCH"));
  return router;
}
