/**
 * JSON writes NaN and Infinity as null without a word: a figure that is no number must not leave the server.
 *
 * @throws {Error} a fault of ours, since what came in was checked
 */
export function refuseNaN(value: unknown): void {
  if (typeof value === "number") {
    if (!Number.isFinite(value)) throw new Error("a figure is not a finite number");
  } else if (Array.isArray(value)) {
    // By index, with the usual case in place: a curve has hundreds of levels.
    for (let index = 0; index < value.length; index++)
      if (!Number.isFinite(value[index])) refuseNaN(value[index] as unknown);
  } else if (typeof value === "object" && value !== null) {
    for (const inner of Object.values(value)) refuseNaN(inner);
  }
}
