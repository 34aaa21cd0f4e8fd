import { counts } from "../../shared/contract/limits.ts";
import type { DoseRecord, Give, Order } from "../../shared/contract/schedule.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { plainText } from "../case/form-of-setting.ts";
import { momentText, readMoment } from "../controls/moment.ts";
import { readOptional } from "../controls/read-field.ts";
import { lengthProblem } from "../controls/text-length.ts";

type Exception = Order["exceptions"][number];
type Outcome = DoseRecord["outcome"];

/** What the editor of one scheduled dose says: how it is planned, and what was given. */
export interface DoseEdit {
  /** Absent: as the rest of its order. */
  readonly exception?: Exception;
  /** Absent: nothing is recorded. */
  readonly record?: DoseRecord;
}

export type ReadDose =
  | { readonly ok: true; readonly edit: DoseEdit }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

export type PlanChoice = "as-rest" | "changed" | "left-out";
export type GivenChoice = "none" | "as-planned" | "changed" | "omitted";

export function planChoiceOf(draft: Draft): PlanChoice {
  const plan = textIn(draft, "plan");
  return plan === "changed" || plan === "left-out" ? plan : "as-rest";
}

export function givenChoiceOf(draft: Draft): GivenChoice {
  const given = textIn(draft, "given");
  return given === "as-planned" || given === "changed" || given === "omitted" ? given : "none";
}

/** A scheduled dose that belongs to an order. */
export type OrderedDose = ScheduledDose & { readonly orderId: string; readonly occurrence: number };

/** The editor's two statements about one dose; every problem at once, by field. */
export function readDoseDraft(draft: Draft, { orderId, occurrence, give }: OrderedDose, timeZone: string): ReadDose {
  const problems: Record<string, string> = {};
  const plan = planChoiceOf(draft);
  const given = givenChoiceOf(draft);
  const planned = plan === "changed" ? readParts(draft, "plan", give, timeZone, problems) : {};
  const changed = given === "changed" ? readParts(draft, "given", give, timeZone, problems) : {};
  if (given === "changed" && Object.keys(changed).length === 0 && Object.keys(problems).length === 0)
    problems["given-at"] = "What was given otherwise must name another time, amount or duration";
  if (plan === "changed" && Object.keys(planned).length === 0 && Object.keys(problems).length === 0)
    problems["plan-at"] = "What is planned otherwise must name another time, amount or duration";
  const long = lengthProblem("Note on what was given", textIn(draft, "note"), counts.noteCharacters);
  if (long !== undefined) problems["note"] = long;
  if (Object.keys(problems).length > 0) return { ok: false, problems };
  const exception: Exception | undefined =
    plan === "left-out" ? { occurrence, skip: true } : plan === "changed" ? { occurrence, ...planned } : undefined;
  const outcome: Outcome | undefined =
    given === "none" ? undefined : given === "changed" ? { kind: "changed", ...changed } : { kind: given };
  const record = outcome && { orderId, occurrence, outcome, note: textIn(draft, "note") };
  return { ok: true, edit: { ...(exception && { exception }), ...(record && { record }) } };
}

/** A dose as its editor shows it. */
export function draftOfDose(exception: Exception | undefined, record: DoseRecord | undefined, timeZone: string): Draft {
  const left = exception !== undefined && "skip" in exception;
  return {
    plan: exception === undefined ? "as-rest" : left ? "left-out" : "changed",
    ...(exception !== undefined && !left && draftOfParts("plan", exception, timeZone)),
    given: record?.outcome.kind ?? "none",
    ...(record?.outcome.kind === "changed" && draftOfParts("given", record.outcome, timeZone)),
    note: record?.note ?? "",
  };
}

interface Parts {
  readonly at?: string;
  readonly amountMg?: number;
  readonly durationH?: number;
}

/** Empty fields stay as they are; a pump log can only be moved. */
function readParts(
  draft: Draft,
  prefix: string,
  give: Give,
  timeZone: string,
  problems: Record<string, string>,
): Parts {
  const moment = momentIn(draft, `${prefix}-at`);
  const at = moment.text.trim() === "" ? undefined : readMoment(moment, timeZone, "Time");
  const amount = give.kind === "pump" ? undefined : readOptional("amountMg", textIn(draft, `${prefix}-amount`));
  const duration =
    give.kind === "infusion" ? readOptional("durationH", textIn(draft, `${prefix}-duration`)) : undefined;
  if (at?.ok === false) problems[`${prefix}-at`] = at.problem;
  if (amount?.ok === false) problems[`${prefix}-amount`] = amount.problem;
  if (duration?.ok === false) problems[`${prefix}-duration`] = duration.problem;
  return {
    ...(at?.ok && { at: at.instant }),
    ...(amount?.ok && { amountMg: amount.value }),
    ...(duration?.ok && { durationH: duration.value }),
  };
}

function draftOfParts(prefix: string, { at, amountMg, durationH }: Parts, timeZone: string): Draft {
  return {
    ...(at !== undefined && momentFields(`${prefix}-at`, momentText(at, timeZone))),
    ...(amountMg !== undefined && { [`${prefix}-amount`]: plainText(amountMg) }),
    ...(durationH !== undefined && { [`${prefix}-duration`]: plainText(durationH) }),
  };
}
