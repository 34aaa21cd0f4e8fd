import { z } from "zod";
import { Case, Regimen, Revision } from "../../shared/contract/case.ts";

/** Answers that are made of several documents of the contract. */
export const CaseList = z.strictObject({ cases: z.array(Case) }).meta({ id: "CaseList" });
export const RegimenList = z.strictObject({ regimens: z.array(Regimen) }).meta({ id: "RegimenList" });
export const RevisionList = z.strictObject({ revisions: z.array(Revision) }).meta({ id: "RevisionList" });

const RegimenWithLatest = z
  .strictObject({ ...Regimen.shape, latest: Revision.exactOptional() })
  .meta({ id: "RegimenWithLatest" });
export const WholeCase = z.strictObject({ case: Case, regimens: z.array(RegimenWithLatest) }).meta({ id: "WholeCase" });

export const Health = z.strictObject({ status: z.enum(["live", "ready"]) }).meta({ id: "Health" });
