import { describe, expect, test } from "vitest";
import { cycleOf } from "../../../shared/schedule/cycle.ts";
import { everyEight, inventedContent } from "../../invented-content.ts";

const bolus = { kind: "bolus", amountMg: 100 } as const;
const open = { kind: "open" } as const;
const from = "2026-03-02T08:00:00Z";
const every = (
  id: string,
  intervalH: number,
  begins = from,
  end: { kind: "open" } | { kind: "count"; doses: number } = open,
) => ({
  id,
  give: bolus,
  when: { kind: "every" as const, from: begins, intervalH, end },
});

describe("cycleOf", () => {
  test("is the interval of the only order", () => {
    expect(cycleOf(inventedContent())).toMatchObject({
      kind: "cycle",
      cycleH: 8,
      startsAt: from,
      doses: [{ kind: "infusion", atH: 0 }],
    });
  });

  test("is the least common multiple of the intervals, from when all of them run", () => {
    const orders = [every("a", 6), every("b", 8, "2026-03-02T10:00:00Z")];
    const cycle = cycleOf(inventedContent({ schedule: { orders } }));
    expect(cycle).toMatchObject({ kind: "cycle", cycleH: 24, startsAt: "2026-03-02T10:00:00Z" });
    if (cycle.kind !== "cycle") throw new Error("no cycle");
    expect(cycle.doses.map((dose) => (dose.kind === "pump" ? Number.NaN : dose.atH))).toEqual([
      4, 10, 16, 22, 0, 8, 16,
    ]);
  });

  test("leaves out a loading dose and an order that has ended", () => {
    const loading = { id: "l", give: bolus, when: { kind: "once" as const, at: from } };
    const ended = every("e", 6, from, { kind: "count", doses: 2 });
    const cycle = cycleOf(
      inventedContent({ schedule: { orders: [loading, ended, every("a", 12, "2026-03-02T20:00:00Z")] } }),
    );
    expect(cycle).toMatchObject({ kind: "cycle", cycleH: 12, orderIds: ["a"] });
  });

  test("takes unequal amounts at clock times as one day", () => {
    const times = [{ time: "08:00", amountMg: 300 }, { time: "20:00" }];
    const orders = [
      { id: "c", give: bolus, when: { kind: "clock-times" as const, from: "2026-03-02T12:00:00Z", times, end: open } },
    ];
    expect(cycleOf(inventedContent({ schedule: { orders } }))).toMatchObject({
      kind: "cycle",
      cycleH: 24,
      startsAt: "2026-03-02T20:00:00Z",
      doses: [
        { atH: 12, amountMg: 300 },
        { atH: 0, amountMg: 100 },
      ],
    });
  });

  test.for([
    { orders: [], why: "no order repeats" },
    { orders: [{ ...everyEight, when: { kind: "once" as const, at: from } }], why: "no order repeats" },
    {
      orders: [every("a", 7.1), every("b", 11.3)],
      why: "the repeating orders meet again only after 802.3 h, longer than 672 h",
    },
  ])("has no cycle where $why", ({ orders, why }) => {
    expect(cycleOf(inventedContent({ schedule: { orders } }))).toEqual({ kind: "none", why });
  });
});
