import { Worker } from "node:worker_threads";
import type { WriteSheet } from "../app-needs.ts";
import { answerQuestion, type Calculate } from "../predictions/answer-question.ts";
import { RequestError } from "../request-errors.ts";
import type { Appraisal } from "../revisions/appraise.ts";
import type { Appraise } from "../revisions/judge-content.ts";
import { DescribedError } from "../silent-description.ts";
import type { Job, Result } from "./job.ts";

export interface JobRunner {
  readonly calculate: Calculate;
  readonly appraise: Appraise;
  readonly writeSheet: WriteSheet;
  stop(): Promise<void>;
}

interface Waiting {
  readonly resolve: (value: unknown) => void;
  readonly reject: (error: Error) => void;
  readonly timer: NodeJS.Timeout;
}

/**
 * One worker thread for what takes long, so that a year of doses or a sheet does not hold up every other
 * request. A job that takes too long ends the thread with all that wait for it; the next job starts a new
 * one. Only in the built program: Node starts a thread from a .js file.
 *
 * @param mostMs how long one job may take, with those before it
 */
export function jobRunner(mostMs = 30_000): JobRunner {
  const waiting = new Map<number, Waiting>();
  let thread: Worker | undefined;
  let lastId = 0;
  const fail = (error: Error) => {
    thread = undefined;
    for (const { reject, timer } of waiting.values()) {
      clearTimeout(timer);
      reject(error);
    }
    waiting.clear();
  };
  const started = (): Worker => {
    const made = new Worker(new URL("./job-thread.js", import.meta.url));
    made.on("message", (result: Result) => {
      const job = waiting.get(result.id);
      if (job === undefined) return;
      waiting.delete(result.id);
      clearTimeout(job.timer);
      if (result.ok) job.resolve(result.value);
      else job.reject(new DescribedError("a job failed", result.error));
    });
    made.on("error", () => fail(new Error("the job thread failed")));
    made.on("exit", () => made === thread && fail(new Error("the job thread ended")));
    // Last, because listening holds the process open again: a thread without a job must not.
    made.unref();
    return made;
  };
  const run = (job: Job): Promise<unknown> =>
    new Promise((resolve, reject) => {
      thread ??= started();
      const id = ++lastId;
      const timer = setTimeout(() => {
        void thread?.terminate();
        fail(new RequestError("too-long", `nothing was done: it would have taken longer than ${mostMs / 1_000} s`));
      }, mostMs);
      waiting.set(id, { resolve, reject, timer });
      thread.postMessage({ id, job });
    });
  return {
    async calculate(question) {
      try {
        return (await run({ kind: "answer", question })) as Uint8Array;
      } catch (error) {
        if (error instanceof RequestError) throw error;
        // Looked at again here: what a bad question deserves to be told lost its class between the threads.
        return answerQuestion(question);
      }
    },
    appraise: async (content) => (await run({ kind: "appraise", content })) as Appraisal,
    writeSheet: async (revision, { paper }) => (await run({ kind: "sheet", revision, paper })) as Uint8Array,
    async stop() {
      await thread?.terminate();
    },
  };
}
