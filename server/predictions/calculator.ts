import { Worker } from "node:worker_threads";
import { answerQuestion, type Question } from "./answer-question.ts";

/** Answers a question; rejects with the error that the question deserves. */
export type Calculate = (question: Question) => Promise<Uint8Array>;

/** One question with its place in the line, as it goes to the thread. */
export interface Asked {
  readonly id: number;
  readonly question: Question;
}

/** The thread's answer; without a text the question could not be answered, and is looked at again here. */
export interface Answered {
  readonly id: number;
  readonly text?: Uint8Array;
}

export interface Calculator {
  readonly calculate: Calculate;
  stop(): Promise<void>;
}

/** Computes on the thread that answers. */
export const calculateHere: Calculate = async (question) => answerQuestion(question);

/**
 * A thread that does the computing and the writing of numbers, so that the thread that answers stays free
 * for others, and a second core is used where there is one. Questions of one turn go over together. Only in
 * the built program: Node starts a thread from a .js file.
 *
 * Whatever the thread cannot answer is computed here: errors lose their class on the way between threads.
 */
export function threadCalculator(): Calculator {
  const waiting = new Map<
    number,
    { readonly question: Question; readonly settle: (text: Uint8Array | Error) => void }
  >();
  let thread: Worker | undefined;
  let gathered: Asked[] = [];
  let lastId = 0;
  const takeBack = () => {
    thread = undefined;
    const left = [...waiting.values()];
    waiting.clear();
    for (const { question, settle } of left) settle(answerHere(question));
  };
  const started = (): Worker => {
    const made = new Worker(new URL("./calculator-thread.js", import.meta.url));
    made.on("message", ({ id, text }: Answered) => {
      const asked = waiting.get(id);
      waiting.delete(id);
      asked?.settle(text ?? answerHere(asked.question));
    });
    made.on("error", () => made === thread && takeBack());
    made.on("exit", () => made === thread && takeBack());
    // Last, because listening holds the process open again: a thread without a question must not.
    made.unref();
    return made;
  };
  const send = () => {
    thread ??= started();
    thread.postMessage(gathered);
    gathered = [];
  };
  return {
    calculate: (question) =>
      new Promise((resolve, reject) => {
        const id = ++lastId;
        waiting.set(id, { question, settle: (text) => (text instanceof Error ? reject(text) : resolve(text)) });
        gathered.push({ id, question });
        if (gathered.length === 1) setImmediate(send);
      }),
    async stop() {
      const stopping = thread;
      thread = undefined;
      await stopping?.terminate();
    },
  };
}

function answerHere(question: Question): Uint8Array | Error {
  try {
    return answerQuestion(question);
  } catch (error) {
    return error instanceof Error ? error : new Error("a question could not be answered");
  }
}
