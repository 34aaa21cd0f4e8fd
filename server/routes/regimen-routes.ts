import { Router } from "express";
import type { CaseStore } from "../../db/case-store.ts";
import type { RegimenStore } from "../../db/regimen-store.ts";
import { NotFoundError } from "../../db/store-errors.ts";
import { CaseId, RegimenChange, RegimenDraft, RegimenId } from "../../shared/contract/case.ts";
import type { Clock, Ids } from "../app-needs.ts";
import { intentionOf } from "../intention.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read, readId } from "../read.ts";

interface Needs {
  readonly stores: { readonly cases: CaseStore; readonly regimens: RegimenStore };
  readonly clock: Clock;
  readonly ids: Ids;
}

export function regimenRoutes({ stores: { cases, regimens }, clock, ids }: Needs): Router {
  const router = Router();
  router
    .route("/cases/:caseId/regimens")
    .get(async (request, response) => {
      const caseId = readId(CaseId, request.params.caseId, "case");
      if ((await cases.find(caseId)) === undefined) throw new NotFoundError("case");
      response.json({ regimens: await regimens.listOfCase(caseId) });
    })
    .post(jsonBody("usual"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const caseId = readId(CaseId, request.params.caseId, "case");
      const { label } = read(RegimenDraft, request.body);
      const made = { id: RegimenId.parse(ids()), caseId, label, retired: false, createdAt: intention.at };
      response.status(201).json(await regimens.add(intention, made));
    })
    .all(only("GET", "POST"));
  router
    .route("/cases/:caseId/regimens/:regimenId")
    .patch(jsonBody("usual"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const caseId = readId(CaseId, request.params.caseId, "case");
      const id = readId(RegimenId, request.params.regimenId, "regimen");
      response.json(await regimens.change(intention, caseId, id, read(RegimenChange, request.body)));
    })
    .all(only("PATCH"));
  return router;
}
