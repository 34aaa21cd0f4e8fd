import { Router } from "express";
import { z } from "zod";
import type { AnswerStore } from "../../db/answer-store.ts";
import type { RegimenStore } from "../../db/regimen-store.ts";
import type { RevisionStore } from "../../db/revision-store.ts";
import { NotFoundError, StaleError } from "../../db/store-errors.ts";
import { CaseId, RegimenId, Revision, RevisionDraft, RevisionId } from "../../shared/contract/case.ts";
import type { Clock, Ids, WriteSheet } from "../app-needs.ts";
import { intentionOf } from "../intention.ts";
import { jsonBody } from "../json-body.ts";
import { only } from "../methods.ts";
import { read, readId } from "../read.ts";
import { type Appraise, judgeContent } from "../revisions/judge-content.ts";
import { revisionAnswer, withStanding } from "../with-cautions.ts";

export const SheetQuery = z.strictObject({
  paper: z.enum(["A4", "Letter"], { error: 'must be "A4" or "Letter"' }).default("A4"),
});

interface Needs {
  readonly stores: {
    readonly regimens: RegimenStore;
    readonly revisions: RevisionStore;
    readonly answers: AnswerStore;
  };
  readonly clock: Clock;
  readonly ids: Ids;
  readonly writeSheet: WriteSheet;
  readonly appraise: Appraise;
}

export function revisionRoutes({
  stores: { regimens, revisions, answers },
  clock,
  ids,
  writeSheet,
  appraise,
}: Needs): Router {
  const router = Router();
  const regimenAt = async (params: { caseId: string; regimenId: string }) => {
    const found = await regimens.find(
      readId(CaseId, params.caseId, "case"),
      readId(RegimenId, params.regimenId, "regimen"),
    );
    if (found === undefined) throw new NotFoundError("regimen");
    return found;
  };
  const revisionAt = async (params: { revisionId: string }) => {
    const found = await revisions.find(readId(RevisionId, params.revisionId, "revision"));
    if (found === undefined) throw new NotFoundError("revision");
    return found;
  };
  router
    .route("/cases/:caseId/regimens/:regimenId/revisions")
    .get(async (request, response) => {
      const regimen = await regimenAt(request.params);
      const listed = (await revisions.listOfRegimen(regimen.id)).map(revisionAnswer);
      response.json(withStanding({ revisions: listed }));
    })
    .post(jsonBody("usual"), async (request, response) => {
      const intention = intentionOf(request, clock());
      const answered = await answers.find(intention, Revision);
      const saved = answered ?? (await save(intention, request.params, request.body));
      response.status(201).location(`/api/revisions/${saved.id}`).json(revisionAnswer(saved));
    })
    .all(only("GET", "POST"));
  router
    .route("/revisions/:revisionId")
    .get(async (request, response) => {
      response.json(revisionAnswer(await revisionAt(request.params)));
    })
    .all(only("GET"));
  router
    .route("/revisions/:revisionId/sheet.pdf")
    .get(async (request, response) => {
      const { paper } = read(SheetQuery, request.query);
      const revision = await revisionAt(request.params);
      const sheet = await writeSheet(revision, { paper });
      // The name is ours and ASCII: a label in a header could carry anything, and a name of a person.
      response.set(
        "Content-Disposition",
        `inline; filename="ebbline-revision-${revision.number}-${revision.contentHash.slice(0, 8)}.pdf"`,
      );
      response.type("application/pdf").send(Buffer.from(sheet.buffer, sheet.byteOffset, sheet.byteLength));
    })
    .all(only("GET"));
  return router;

  async function save(
    intention: ReturnType<typeof intentionOf>,
    params: { caseId: string; regimenId: string },
    body: unknown,
  ): Promise<Revision> {
    const { id: regimenId, caseId, latestRevisionNumber } = await regimenAt(params);
    const { basedOnNumber, ...draft } = read(RevisionDraft, body);
    // Said before anything is computed, and made sure of by the store when it writes.
    if (basedOnNumber !== latestRevisionNumber) throw new StaleError("regimen", basedOnNumber, latestRevisionNumber);
    const secondOpinion = await judgeContent(draft.content, "#/content", appraise);
    return revisions.add(intention, basedOnNumber, {
      ...draft,
      id: RevisionId.parse(ids()),
      caseId,
      regimenId,
      createdAt: intention.at,
      secondOpinion,
    });
  }
}
