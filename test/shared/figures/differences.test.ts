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

  test("tells two long pump logs apart, also where the steps that differ are not read out", () => {
    // 19 mg per hour in the one quarter of an hour or in the next: the same in all, and the same at most.
    const log = (lastRate: number) => ({
      kind: "pump" as const,
      steps: [
        ...Array.from({ length: 60 }, (_, index) => ({ afterH: index / 4, rateMgPerH: 20 })).with(
          lastRate === 19 ? 59 : 58,
          { afterH: (lastRate === 19 ? 59 : 58) / 4, rateMgPerH: 19 },
        ),
        { afterH: 15, rateMgPerH: 0 },
      ],
    });
    const ordered = (rate: number) => inventedContent({ schedule: { orders: [{ ...everyEight, give: log(rate) }] } });
    const extra = (rate: number) =>
      inventedContent({ schedule: { extras: [{ id: "x", at: "2026-03-02T12:00:00Z", give: log(rate) }] } });
    expect(differencesOf(ordered(20), ordered(19))).toMatchObject([{ label: "Order 1: what" }]);
    expect(differencesOf(ordered(20), ordered(19))[0]!.after).toContain(
      "and 21 more steps; other steps among those not shown",
    );
    expect(differencesOf(extra(20), extra(19))).toMatchObject([{ label: "Extra dose given" }]);
    expect(differencesOf(extra(20), extra(20))).toEqual([]);
  });
});
