import { z } from "zod";
import { Case, Regimen, Revision } from "./case.ts";
import { Caution } from "./caution.ts";

/** Goes with every answer that holds a dose or a level; the standing caution is always among them. */
const cautions = z.array(Caution).min(1);

export const CaseAnswer = z.strictObject({ ...Case.shape, cautions }).meta({ id: "CaseAnswer" });
export type CaseAnswer = z.infer<typeof CaseAnswer>;

export const CaseList = z.strictObject({ cases: z.array(Case), cautions }).meta({ id: "CaseList" });
export type CaseList = z.infer<typeof CaseList>;

/** A revision with everything to be said about what it holds. */
export const RevisionAnswer = z.strictObject({ ...Revision.shape, cautions }).meta({ id: "RevisionAnswer" });
export type RevisionAnswer = z.infer<typeof RevisionAnswer>;

export const RevisionList = z
  .strictObject({ revisions: z.array(RevisionAnswer), cautions })
  .meta({ id: "RevisionList" });
export type RevisionList = z.infer<typeof RevisionList>;

export const RegimenList = z.strictObject({ regimens: z.array(Regimen) }).meta({ id: "RegimenList" });

export const RegimenWithLatest = z
  .strictObject({ ...Regimen.shape, latest: RevisionAnswer.exactOptional() })
  .meta({ id: "RegimenWithLatest" });
export type RegimenWithLatest = z.infer<typeof RegimenWithLatest>;

export const WholeCase = z
  .strictObject({ case: Case, regimens: z.array(RegimenWithLatest), cautions })
  .meta({ id: "WholeCase" });
export type WholeCase = z.infer<typeof WholeCase>;
