import { Router } from "express";
import { NotFoundError } from "../../db/store-errors.ts";
import type { Stores } from "../../db/stores.ts";
import type { WholeCase } from "../../db/whole-case-store.ts";
import { Case, type CaseFile, CaseId, RegimenId, type Revision, RevisionId } from "../../shared/contract/case.ts";
import type { Clock, Ids } from "../app-needs.ts";
import { readCaseFile } from "../case-files/read-case-file.ts";
import { writeCaseFile } from "../case-files/write-case-file.ts";
import { intentionOf } from "../intention.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { readId } from "../read.ts";
import { RequestError } from "../request-errors.ts";
import { type Appraise, judgeContent } from "../revisions/judge-content.ts";
import { withStanding } from "../with-cautions.ts";

/** For all the second opinions of one file. */
const mostMs = 60_000;

interface Needs {
  readonly stores: Pick<Stores, "cases" | "regimens" | "revisions" | "wholeCases" | "answers">;
  readonly clock: Clock;
  readonly ids: Ids;
  readonly appraise: Appraise;
}

/** A case out as a file and in again as a new case. */
export function caseFileRoutes({ stores, clock, ids, appraise }: Needs): Router {
  const router = Router();
  router
    .route("/cases/:caseId/file")
    .get(async (request, response) => {
      const id = readId(CaseId, request.params.caseId, "case");
      const found = await stores.cases.find(id);
      if (found === undefined) throw new NotFoundError("case");
      const regimens = await stores.regimens.listOfCase(id);
      const filled = await Promise.all(
        regimens.map(async (regimen) => ({ regimen, revisions: await stores.revisions.listOfRegimen(regimen.id) })),
      );
      response.set("Content-Disposition", `attachment; filename="ebbline-case-${id.slice(0, 8)}.json"`);
      response.json(writeCaseFile(found, filled, clock()));
    })
    .all(only("GET"));
  router
    .route("/case-files")
    .post(jsonBody("caseFile"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const answered = await stores.answers.find(intention, Case);
      const kept = answered ?? (await stores.wholeCases.add(intention, await newCase(readCaseFile(request.body))));
      response.status(201).location(`/api/cases/${kept.id}`).json(withStanding(kept));
    })
    .all(only("POST"));
  return router;

  /** New ids for all of it, so that a file can be taken in beside the case it was written from. */
  async function newCase(file: CaseFile): Promise<WholeCase> {
    const now = clock();
    const made = Case.parse({
      ...file.case,
      id: ids(),
      version: 1,
      archived: false,
      demo: false,
      createdAt: now,
      changedAt: now,
    });
    const startedAtMs = performance.now();
    const regimens: WholeCase["regimens"][number][] = [];
    for (const [index, { label, retired, revisions: inFile }] of file.regimens.entries()) {
      const regimen = {
        id: RegimenId.parse(ids()),
        caseId: made.id,
        label,
        retired,
        createdAt: inFile[0]?.createdAt ?? now,
      };
      const revisions: Revision[] = [];
      for (const [number, revision] of inFile.entries()) {
        if (performance.now() - startedAtMs > mostMs)
          throw new RequestError("too-long", "the file holds more than can be computed again in one go");
        const secondOpinion = await judgeContent(
          revision.content,
          `#/regimens/${index}/revisions/${number}/content`,
          appraise,
        );
        revisions.push({
          ...revision,
          id: RevisionId.parse(ids()),
          caseId: made.id,
          regimenId: regimen.id,
          secondOpinion,
        });
      }
      regimens.push({ regimen, revisions });
    }
    return { case: made, regimens };
  }
}
