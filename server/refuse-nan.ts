/**
 * JSON writes NaN and Infinity as null without a word: a figure that is no number must not leave the server.
 *
 * @param text the answer as it was written; without a null in it there is nothing to look for
 * @throws {Error} a fault of ours, since what came in was checked
 */
export function refuseNaN(answer: unknown, text: Buffer): void {
  if (text.includes("null")) findNaN(answer);
}

function findNaN(value: unknown): void {
  if (typeof value === "number") {
    if (!Number.isFinite(value)) throw new Error("a figure is not a finite number");
  } else if (typeof value === "object" && value !== null) {
    for (const inner of Object.values(value)) findNaN(inner);
  }
}
