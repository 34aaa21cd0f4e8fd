import { describe, expect, test } from "vitest";
import { differencesOf } from "../../../shared/figures/differences.ts";
import { everyEight, inventedContent, stated } from "../../invented-content.ts";

const plan = { start: "2026-03-02T08:00:00Z", horizonH: 48 };
const plain = (text: string) => text.replaceAll("\u00a0", " ");

describe("differencesOf", () => {
  test("finds none between a content and itself", () => {
    expect(differencesOf(inventedContent(), inventedContent())).toEqual([]);
  });

  test("names each field that differs, before and after, in words with units", () => {
    const after = inventedContent({
      setting: {
        plan,
        kinetics: { volumeL: stated(42), clearanceLPerH: stated(5) },
        rangeMgPerL: { low: 5, high: 15 },
      },
      schedule: {
        orders: [{ ...everyEight, give: { kind: "infusion", amountMg: 450, durationH: 0.5 } }],
        records: [{ orderId: "o1", occurrence: 1, outcome: { kind: "omitted" }, note: "line was out" }],
      },
    });
    const found = differencesOf(inventedContent(), after).map(({ label, before, after: then }) => [
      label,
      plain(before),
      plain(then),
    ]);
    expect(found).toEqual([
      ["Volume of distribution", "40 L (typed: invented for a test)", "42 L (typed: invented for a test)"],
      ["Desired range", "", "5 mg/L to 15 mg/L"],
      ["Order 1: what", "500 mg over 1 h (500 mg per hour)", "450 mg over 30 min (900 mg per hour)"],
      ["Given: order 1, dose 2", "", "omitted (line was out)"],
    ]);
  });

  test("tells another origin from the same value", () => {
    const noted = inventedContent({
      setting: {
        plan,
        kinetics: { volumeL: { value: 40, origin: { kind: "typed", note: "weighed" } }, clearanceLPerH: stated(5) },
      },
    });
    expect(differencesOf(inventedContent(), noted)).toHaveLength(1);
  });
});
