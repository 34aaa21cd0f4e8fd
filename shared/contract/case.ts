import { z } from "zod";
import { Caution } from "./caution.ts";
import { counts } from "./limits.ts";
import { DoseRecord, ExtraDose, eachIdOnce, Instant, Order } from "./schedule.ts";
import { CaseSetting } from "./setting.ts";

export const CaseId = z.uuid().brand<"CaseId">();
export type CaseId = z.infer<typeof CaseId>;
export const RegimenId = z.uuid().brand<"RegimenId">();
export type RegimenId = z.infer<typeof RegimenId>;
export const RevisionId = z.uuid().brand<"RevisionId">();
export type RevisionId = z.infer<typeof RevisionId>;

/**
 * One line of text that reads as it was typed. Signs that turn the direction of writing could make the
 * text beside a label, such as a dose, look like another; letters of right-to-left scripts need none.
 */
const oneLine = (whenEmpty: string) =>
  z
    .string()
    .trim()
    .min(1, { error: whenEmpty })
    .max(counts.labelCharacters)
    .refine((text) => !/[\p{Cc}\u2028-\u202e\u2066-\u2069]/u.test(text), {
      error: "must be one line without control characters or signs that turn the direction of writing",
    });

const label = oneLine("must not be empty");
const note = z.string().max(counts.noteCharacters);

/** An IANA zone that this machine's time zone data knows. */
export const TimeZone = z.string().refine(isTimeZone, { error: "must be an IANA time zone such as Europe/London" });

/** SHA-256 in lower-case hexadecimal. */
export const ContentHash = z.string().regex(/^[0-9a-f]{64}$/);

export const CaseDraft = z
  .strictObject({ label, timeZone: TimeZone, notes: note.default(""), setting: CaseSetting.exactOptional() })
  .meta({ id: "CaseDraft" });
export type CaseDraft = z.infer<typeof CaseDraft>;

/** `version` counts changes: a change made from an older version is refused, so nobody's work is lost. */
export const Case = z
  .strictObject({
    id: CaseId,
    version: z.int().min(1),
    label,
    timeZone: TimeZone,
    notes: note,
    setting: CaseSetting.exactOptional(),
    archived: z.boolean(),
    demo: z.boolean(),
    createdAt: Instant,
    changedAt: Instant,
  })
  .meta({ id: "Case" });
export type Case = z.infer<typeof Case>;

export const CaseChange = z
  .strictObject({
    version: z.int().min(1),
    label: label.exactOptional(),
    timeZone: TimeZone.exactOptional(),
    notes: note.exactOptional(),
    setting: CaseSetting.exactOptional(),
    archived: z.boolean().exactOptional(),
  })
  .meta({ id: "CaseChange" });
export type CaseChange = z.infer<typeof CaseChange>;

/** One alternative of a case; what it says lives in its revisions. */
export const Regimen = z
  .strictObject({
    id: RegimenId,
    caseId: CaseId,
    label,
    retired: z.boolean(),
    createdAt: Instant,
    latestRevisionNumber: z.int().min(0),
  })
  .meta({ id: "Regimen" });
export type Regimen = z.infer<typeof Regimen>;

export const RegimenDraft = z.strictObject({ label }).meta({ id: "RegimenDraft" });
export type RegimenDraft = z.infer<typeof RegimenDraft>;
export const RegimenChange = z
  .strictObject({ label: label.exactOptional(), retired: z.boolean().exactOptional() })
  .meta({ id: "RegimenChange" });
export type RegimenChange = z.infer<typeof RegimenChange>;

/** The schedule itself: what is ordered and what was really given. */
export const Schedule = z
  .strictObject({
    orders: z.array(Order).max(counts.ordersPerAlternative).superRefine(eachIdOnce),
    records: z.array(DoseRecord).max(counts.recordsPerAlternative).default([]),
    extras: z.array(ExtraDose).max(counts.recordsPerAlternative).default([]).superRefine(eachIdOnce),
  })
  .meta({ id: "Schedule" });
export type Schedule = z.infer<typeof Schedule>;

/**
 * Why somebody went on in spite of a caution that stops. It holds the caution's text, so that a reason
 * given for one value does not answer for the next.
 */
export const CautionReason = z
  .strictObject({
    code: z.string().min(1).max(80),
    about: z.string().max(200),
    text: z.string().max(counts.noteCharacters),
    reason: z.string().trim().min(3, { error: "must say why, in at least 3 characters" }).max(counts.noteCharacters),
  })
  .meta({ id: "CautionReason" });
export type CautionReason = z.infer<typeof CautionReason>;

/** Everything needed to compute one alternative again, whatever happens to the case. */
export const RegimenContent = z
  .strictObject({
    formatVersion: z.literal(1),
    caseLabel: label,
    regimenLabel: label,
    timeZone: TimeZone,
    setting: CaseSetting,
    schedule: Schedule,
    cautionReasons: z.array(CautionReason).max(200).default([]),
  })
  .meta({ id: "RegimenContent" });
export type RegimenContent = z.infer<typeof RegimenContent>;

/** `basedOnNumber` is the newest revision the author had seen (0 for none); a stale one is refused. */
export const RevisionDraft = z
  .strictObject({
    basedOnNumber: z.int().min(0),
    reason: z.string().trim().min(3, { error: "must say why, in at least 3 characters" }).max(counts.noteCharacters),
    preparedBy: oneLine("must name who prepared it"),
    content: RegimenContent,
  })
  .meta({ id: "RevisionDraft" });
export type RevisionDraft = z.infer<typeof RevisionDraft>;

/** How far the walk and the independent numerical convolution lie apart. */
export const SecondOpinion = z
  .strictObject({
    largestDifferenceMgPerL: z.number().min(0),
    atH: z.number().min(0),
    largestLevelMgPerL: z.number().min(0),
    relative: z.number().min(0),
    points: z.int().min(1),
  })
  .meta({ id: "SecondOpinion" });
export type SecondOpinion = z.infer<typeof SecondOpinion>;

/** Immutable. contentHash covers number, createdAt, reason, preparedBy and content (RFC 8785 form). */
export const Revision = z
  .strictObject({
    id: RevisionId,
    caseId: CaseId,
    regimenId: RegimenId,
    number: z.int().min(1),
    createdAt: Instant,
    reason: z.string(),
    preparedBy: z.string(),
    content: RegimenContent,
    contentHash: ContentHash,
    secondOpinion: SecondOpinion,
  })
  .meta({ id: "Revision" });
export type Revision = z.infer<typeof Revision>;

/** A whole case as a file. Readers refuse a version they do not know. */
export const CaseFile = z
  .strictObject({
    format: z.literal("ebbline-case", { error: 'must be "ebbline-case": this is not a case file of this program' }),
    formatVersion: z.literal(1, { error: "must be 1: the file was written by another version of this program" }),
    exportedAt: Instant,
    case: z.strictObject({ label, timeZone: TimeZone, notes: note, setting: CaseSetting.exactOptional() }),
    regimens: z
      .array(
        z.strictObject({
          label,
          retired: z.boolean(),
          revisions: z
            .array(Revision.omit({ id: true, caseId: true, regimenId: true, secondOpinion: true }))
            .max(1_000),
        }),
      )
      .max(100),
    /** For whoever reads the file; taken in again, cautions are computed anew. */
    cautions: z.array(Caution).max(100).exactOptional(),
  })
  .meta({ id: "CaseFile" });
export type CaseFile = z.infer<typeof CaseFile>;

function isTimeZone(name: string): boolean {
  // A zone name without a slash other than UTC is an old alias or an offset: refused, it hides the rules.
  if (name !== "UTC" && !/^[A-Za-z_]+(\/[A-Za-z0-9_+-]+)+$/.test(name)) return false;
  try {
    return new Intl.DateTimeFormat("en-GB", { timeZone: name }).resolvedOptions().timeZone !== "";
  } catch {
    return false;
  }
}
