import { describe, expect, test } from "vitest";
import type { Order } from "../../../shared/contract/schedule.ts";
import { sayGive, sayOrder } from "../../../shared/schedule/say-order.ts";
import { everyEight } from "../../invented-content.ts";

const at = "2026-03-03T20:00:00Z";

describe("an order in words", () => {
  test("says that nothing is given at the time it ends", () => {
    const end = { kind: "until", at } as const;
    const order = { ...everyEight, when: { kind: "every", from: "2026-03-02T20:00:00Z", intervalH: 8, end } };
    expect(sayOrder(order as Order, "UTC")).toMatch(/ until before Tue 3 Mar 2026 20:00$/);
  });

  test("tells when a pump log that waits gives its first rate", () => {
    const steps = [
      { afterH: 32, rateMgPerH: 50 },
      { afterH: 60, rateMgPerH: 0 },
    ];
    expect(sayGive({ kind: "pump", steps })).toContain(
      "over 60\u00a0h, the first rate after 32\u00a0h, 1,400\u00a0mg in all",
    );
    const soon = steps.map(({ afterH, rateMgPerH }) => ({ afterH: afterH - 32, rateMgPerH }));
    expect(sayGive({ kind: "pump", steps: soon })).not.toContain("first rate");
  });
});
