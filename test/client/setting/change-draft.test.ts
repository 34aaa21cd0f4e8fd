import { describe, expect, test } from "vitest";
import { draftOfChange, readChangeDraft } from "../../../client/setting/change-draft.ts";
import { sayChange } from "../../../client/setting/say-change.ts";
import { DatedEliminationChange } from "../../../shared/contract/setting.ts";

const zone = "Europe/London";
const origin = { kind: "typed" as const, note: "invented" };

const changes: DatedEliminationChange[] = [
  { id: "a", kind: "rate", from: "2026-03-28T08:00:00Z", origin, eliminationRatePerH: 0.00001 },
  { id: "a", kind: "clearance", from: "2026-03-28T08:00:00Z", origin, clearanceLPerH: 0 },
  {
    id: "a",
    kind: "added-clearance",
    from: "2026-03-28T14:00:00Z",
    until: "2026-03-28T18:00:00Z",
    origin,
    addedClearanceLPerH: 3.5,
  },
];

describe("readChangeDraft", () => {
  test.for(changes)("a change comes back from its editor as it was: $kind", (change) => {
    expect(readChangeDraft(draftOfChange(change, zone), "a", zone)).toEqual({ ok: true, change });
    expect(DatedEliminationChange.parse(change)).toEqual(change);
  });

  test("refuses a span that ends before it begins", () => {
    const draft = { kind: "added-clearance", value: "3.5", from: "2026-03-28 18:00", until: "2026-03-28 14:00" };
    expect(readChangeDraft(draft, "a", zone)).toEqual({
      ok: false,
      problems: { until: "Until must be later than From (2026-03-28 18:00), got 2026-03-28 14:00" },
    });
  });
});

test("a dialysis session is said with its clearance, its times and its length", () => {
  expect(sayChange(changes[2]!, zone)).toBe(
    "3.5\u00a0L/h of clearance added from Sat 28 Mar 2026 14:00 until Sat 28 Mar 2026 18:00 (4\u00a0h)",
  );
});
