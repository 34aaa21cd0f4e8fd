import { describe, expect, test } from "vitest";
import { documentOfCase } from "../../../client/case/document-of-case.ts";
import { sayOtherCautions } from "../../../client/case/other-cautions.ts";
import { inventedCase, inventedWholeCase } from "./invented-case.ts";

/** Two alternatives in a range of 5 to 40 mg/L; B gives ten times the amount and rises above it. */
function twoAlternatives() {
  const whole = inventedWholeCase();
  const { setting } = inventedCase();
  const document = documentOfCase({
    ...whole,
    case: inventedCase({ setting: { ...setting!, rangeMgPerL: { low: 5, high: 40 } } }),
  });
  const [a] = document.alternatives;
  const orders = [{ ...a!.schedule.orders[0]!, give: { kind: "infusion" as const, amountMg: 5_000, durationH: 1 } }];
  return { ...document, alternatives: [a!, { ...a!, key: "b", schedule: { ...a!.schedule, orders } }] };
}

describe("sayOtherCautions", () => {
  test("names the warnings of an alternative that is on the page but not being edited", () => {
    const document = twoAlternatives();
    expect(sayOtherCautions(document, document.alternatives[0]!.key)).toBe(
      "Not shown here, of the other alternatives: B: 1 warning",
    );
  });

  test("says nothing where the others have none, and nothing of the one being edited", () => {
    expect(sayOtherCautions(twoAlternatives(), "b")).toBeUndefined();
  });
});
