import { parentPort } from "node:worker_threads";
import { answerQuestion } from "./answer-question.ts";
import type { Answered, Asked } from "./calculator.ts";

/** Entry of the calculator's thread: each answer goes back as soon as it is there, so that nobody waits for another's. */
parentPort!.on("message", (asked: readonly Asked[]) => {
  for (const each of asked) {
    const answer = answered(each);
    parentPort!.postMessage(answer, answer.text === undefined ? [] : [answer.text.buffer as ArrayBuffer]);
  }
});

function answered({ id, question }: Asked): Answered {
  try {
    // A copy of its own: a small buffer shares its memory with others, and what is handed over is lost here.
    return { id, text: new Uint8Array(answerQuestion(question)) };
  } catch {
    return { id };
  }
}
