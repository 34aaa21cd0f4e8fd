import type { Caution } from "../contract/caution.ts";

/** Goes with every answer that holds a level or a dose. */
export const standingCaution: Caution = {
  code: "standing",
  severity: "note",
  text: "Predicted by arithmetic from the values entered; a real patient may differ. It is not an order: local protocols and a licensed practitioner decide, and a second person checks.",
  about: "answer",
};
