import { parentPort } from "node:worker_threads";
import { answerQuestion } from "../predictions/answer-question.ts";
import { appraise } from "../revisions/appraise.ts";
import { silentDescription } from "../silent-description.ts";
import type { Job, Order, Result } from "./job.ts";

/** Entry of the worker thread: does one job after another and sends back what came of it. */
parentPort!.on("message", async ({ id, job }: Order) => {
  parentPort!.postMessage(await resultOf(id, job));
});

async function resultOf(id: number, job: Job): Promise<Result> {
  try {
    return { id, ok: true, value: await done(job) };
  } catch (error) {
    // An error loses its class on the way between threads, and its message may hold what somebody typed.
    return { id, ok: false, error: silentDescription(error) };
  }
}

async function done(job: Job): Promise<unknown> {
  if (job.kind === "answer") return answerQuestion(job.question);
  if (job.kind === "appraise") return appraise(job.content);
  // Only where one is asked for: fonts and all, it is most of what a thread would have to load.
  const { writeSheet } = await import("../sheet/sheet.ts");
  return writeSheet(job.revision, { paper: job.paper });
}
