import type { RegimenContent } from "../../shared/contract/case.ts";
import { DomainError } from "../../shared/errors.ts";
import { type WaitQuestion, waitUntil } from "../../shared/kinetics/wait-until.ts";
import { instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { formatHours, formatLevel } from "../../shared/units/format.ts";
import { sayRefusal } from "../case/say-refusal.ts";
import { predictionOf } from "./predictions.ts";

/** The answer with its clock time, how far into the plan it is and how long to wait. */
export function sayAnswer(content: RegimenContent, question: WaitQuestion): string {
  const prediction = predictionOf(content);
  if (!prediction.ok) return `cannot be computed: ${prediction.problem}`;
  try {
    const answer = waitUntil(prediction.given.course, question);
    if (answer.kind === "already") return `already ${question.direction} it: ${formatLevel(answer.mgPerL)}`;
    if (answer.kind === "never") return question.meanwhile === "plan-goes-on" ? answer.why : `never: ${answer.why}`;
    const at = instantAt(content.setting.plan.start, answer.atH, content.timeZone);
    return `${sayClock(at, content.timeZone)}; ${formatHours(answer.atH - question.fromH)} to wait, ${formatHours(answer.atH)} into the plan`;
  } catch (error) {
    if (error instanceof DomainError) return `cannot be computed: ${sayRefusal(error, content.timeZone)}`;
    throw error;
  }
}
