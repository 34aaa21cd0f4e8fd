import { describe, expect, test } from "vitest";
import { courseOfContent, givenDiffers } from "../../../shared/schedule/course-of-content.ts";
import { givenDoses, recordsWithoutDose } from "../../../shared/schedule/doses-given.ts";
import { plannedDoses } from "../../../shared/schedule/expand-orders.ts";
import { everyEight, inventedContent, stated } from "../../invented-content.ts";

const typed = { kind: "typed", note: "" } as const;

describe("plannedDoses", () => {
  test("gives an open order until the plan ends, the end itself excluded", () => {
    const doses = plannedDoses(inventedContent());
    expect(doses.map(({ atH }) => atH)).toEqual([0, 8, 16, 24, 32, 40]);
  });

  test.for([
    { end: { kind: "count", doses: 3 }, hours: [0, 8, 16] },
    { end: { kind: "until", at: "2026-03-03T08:00:00Z" }, hours: [0, 8, 16] },
    { end: { kind: "until", at: "2026-03-03T08:00:01Z" }, hours: [0, 8, 16, 24] },
  ] as const)("stops an order as its end $end.kind says", ({ end, hours }) => {
    const when = { kind: "every", from: "2026-03-02T08:00:00Z", intervalH: 8, end } as const;
    const doses = plannedDoses(inventedContent({ schedule: { orders: [{ ...everyEight, when }] } }));
    expect(doses.map(({ atH }) => atH)).toEqual(hours);
  });

  test.for([
    { zone: "Europe/London", start: "2026-03-28T08:00:00Z", gaps: [12, 11, 12, 12, 12] },
    { zone: "Europe/London", start: "2026-10-24T08:00:00+01:00", gaps: [12, 13, 12, 12, 12] },
    { zone: "Pacific/Auckland", start: "2026-09-26T08:00:00+12:00", gaps: [12, 11, 12, 12, 12] },
    { zone: "Australia/Lord_Howe", start: "2026-10-03T08:00:00+10:30", gaps: [12, 11.5, 12, 12, 12] },
    { zone: "Australia/Lord_Howe", start: "2026-04-04T08:00:00+11:00", gaps: [12, 12.5, 12, 12, 12] },
  ])("keeps 08:00 and 20:00 by the clock in $zone from $start", ({ zone, start, gaps }) => {
    const times = [{ time: "20:00" }, { time: "08:00" }];
    const when = {
      kind: "clock-times",
      from: start,
      times,
      end: { kind: "count", doses: 6 },
    } as const;
    const plan = { start, horizonH: 96 };
    const setting = { plan, kinetics: { volumeL: stated(40), clearanceLPerH: stated(5) } };
    const content = inventedContent({ timeZone: zone, setting, schedule: { orders: [{ ...everyEight, when }] } });
    const hours = plannedDoses(content).map(({ atH }) => atH);
    expect(hours.slice(1).map((atH, index) => atH - hours[index]!)).toEqual(gaps);
  });

  test("keeps every 12 h as elapsed time over the same night", () => {
    const start = "2026-03-28T20:00:00Z";
    const when = { kind: "every", from: start, intervalH: 12, end: { kind: "count", doses: 4 } } as const;
    const setting = { plan: { start, horizonH: 72 }, kinetics: { volumeL: stated(40), clearanceLPerH: stated(5) } };
    const content = inventedContent({
      timeZone: "Europe/London",
      setting,
      schedule: { orders: [{ ...everyEight, when }] },
    });
    expect(plannedDoses(content).map(({ at }) => at)).toEqual([
      "2026-03-28T20:00:00Z",
      "2026-03-29T09:00:00+01:00",
      "2026-03-29T21:00:00+01:00",
      "2026-03-30T09:00:00+01:00",
    ]);
  });

  test("gives each clock time its own amount and begins at the order's own time", () => {
    const times = [{ time: "08:00", amountMg: 300 }, { time: "20:00" }];
    const when = { kind: "clock-times", from: "2026-03-02T12:00:00Z", times, end: { kind: "open" } } as const;
    const doses = plannedDoses(inventedContent({ schedule: { orders: [{ ...everyEight, when }] } }));
    expect(doses.map(({ atH, give }) => [atH, give.kind === "pump" ? 0 : give.amountMg])).toEqual([
      [12, 500],
      [24, 300],
      [36, 500],
    ]);
  });

  test.for(["Pacific/Auckland", "Pacific/Kiritimati", "America/Los_Angeles"])(
    "does not ask the machine in %s what day it is",
    (machineZone) => {
      const times = [{ time: "08:00" }];
      const when = { kind: "clock-times", from: "2026-03-02T08:00:00Z", times, end: { kind: "open" } } as const;
      const content = inventedContent({ schedule: { orders: [{ ...everyEight, when }] } });
      const before = process.env["TZ"];
      process.env["TZ"] = machineZone;
      const hours = plannedDoses(content).map(({ atH }) => atH);
      process.env["TZ"] = before;
      expect(hours).toEqual([0, 24]);
    },
  );

  test("numbers doses from the order's beginning, so that an edit stays with its dose", () => {
    const exceptions = [
      { occurrence: 1, skip: true as const },
      { occurrence: 2, at: "2026-03-03T01:30:00Z", amountMg: 250, durationH: 0.5 },
    ];
    const doses = plannedDoses(inventedContent({ schedule: { orders: [{ ...everyEight, exceptions }] } }));
    expect(doses.map(({ occurrence, atH, edited }) => [occurrence, atH, edited])).toEqual([
      [0, 0, false],
      [2, 17.5, true],
      [3, 24, false],
      [4, 32, false],
      [5, 40, false],
    ]);
    expect(doses[1]!.give).toEqual({ kind: "infusion", amountMg: 250, durationH: 0.5 });
  });

  test.for([
    {
      change: { orders: [{ ...everyEight, when: { kind: "once", at: "2026-03-02T07:59:59Z" } as const }] },
      message:
        "schedule/orders/0/when/at must be at or after the start of the plan (2026-03-02T08:00:00Z), got 2026-03-02T07:59:59Z",
    },
    {
      change: { orders: [{ ...everyEight, exceptions: [{ occurrence: 0, at: "2026-03-01T08:00:00Z" }] }] },
      message:
        "schedule/orders/0/exceptions/0/at must be at or after the start of the plan (2026-03-02T08:00:00Z), got 2026-03-01T08:00:00Z",
    },
    {
      change: {
        orders: [
          {
            ...everyEight,
            give: { kind: "bolus" as const, amountMg: 5 },
            exceptions: [{ occurrence: 0, durationH: 1 }],
          },
        ],
      },
      message:
        "schedule/orders/0/exceptions/0/durationH must be left out: only an infusion has a duration, and this is a bolus, got 1",
    },
    {
      change: { extras: [{ id: "x", at: "2026-03-01T08:00:00Z", give: { kind: "bolus" as const, amountMg: 5 } }] },
      message:
        "schedule/extras/0/at must be at or after the start of the plan (2026-03-02T08:00:00Z), got 2026-03-01T08:00:00Z",
    },
  ])("refuses: $message", ({ change, message }) => {
    expect(() => givenDoses(inventedContent({ schedule: change }))).toThrow(message);
  });

  test("refuses more doses than a plan may hold", () => {
    const when = { kind: "every", from: "2026-03-02T08:00:00Z", intervalH: 0.25, end: { kind: "open" } } as const;
    const setting = {
      plan: { start: "2026-03-02T08:00:00Z", horizonH: 2_501 },
      kinetics: { volumeL: stated(40), clearanceLPerH: stated(5) },
    };
    expect(() => plannedDoses(inventedContent({ setting, schedule: { orders: [{ ...everyEight, when }] } }))).toThrow(
      "schedule/orders/0/when must be at most 10000 doses within the plan",
    );
  });
});

describe("givenDoses", () => {
  const records = [
    { orderId: "o1", occurrence: 0, outcome: { kind: "as-planned" as const } },
    {
      orderId: "o1",
      occurrence: 1,
      outcome: { kind: "changed" as const, at: "2026-03-02T18:30:00Z", amountMg: 400, durationH: 2 },
    },
    { orderId: "o1", occurrence: 2, outcome: { kind: "omitted" as const } },
  ];
  const extras = [{ id: "x1", at: "2026-03-03T10:00:00Z", give: { kind: "bolus" as const, amountMg: 100 } }];
  const content = inventedContent({ schedule: { records, extras } });

  test("puts what was recorded in place of what was planned", () => {
    const doses = givenDoses(content);
    expect(doses.map(({ status, atH }) => [status, atH])).toEqual([
      ["as-planned", 0],
      ["changed", 10.5],
      ["omitted", 16],
      ["planned", 24],
      ["extra", 26],
      ["planned", 32],
      ["planned", 40],
    ]);
    expect(doses[1]).toMatchObject({
      plannedAtH: 8,
      give: { amountMg: 400, durationH: 2 },
      plannedGive: { amountMg: 500, durationH: 1 },
    });
  });

  test("leaves omitted doses out of what is computed and the plan alone out of what was given", () => {
    expect(courseOfContent(content, "given").course.doses).toHaveLength(6);
    expect(courseOfContent(content, "planned").course.doses).toHaveLength(6);
    expect(courseOfContent(content, "planned").doses.every(({ status }) => status === "planned")).toBe(true);
    expect(givenDiffers(content)).toBe(true);
    expect(givenDiffers(inventedContent({ schedule: { records: records.slice(0, 1) } }))).toBe(false);
  });

  test("refuses two records of one dose", () => {
    const twice = inventedContent({ schedule: { records: [records[0]!, records[0]!] } });
    expect(() => givenDoses(twice)).toThrow(
      "schedule/records/1 must be the only record of its dose: this one has two, got dose 1",
    );
  });

  test("finds a record whose dose the schedule no longer has", () => {
    const lost = { orderId: "o1", occurrence: 9, outcome: { kind: "omitted" as const } };
    expect(recordsWithoutDose(inventedContent({ schedule: { records: [lost] } }))).toHaveLength(1);
  });
});

describe("courseOfContent", () => {
  const change = {
    id: "c1",
    kind: "rate",
    from: "2026-03-02T20:00:00Z",
    eliminationRatePerH: 0.05,
    origin: typed,
  } as const;
  const session = {
    id: "c2",
    kind: "added-clearance",
    from: "2026-03-03T08:00:00Z",
    until: "2026-03-03T12:00:00Z",
    addedClearanceLPerH: 3.5,
    origin: typed,
  } as const;
  const setting = {
    plan: { start: "2026-03-02T08:00:00Z", horizonH: 48 },
    kinetics: { volumeL: stated(40), clearanceLPerH: stated(5) },
  };

  test("dates changes of elimination from the plan's start", () => {
    const { course } = courseOfContent(
      inventedContent({ setting: { ...setting, eliminationChanges: [change, session] } }),
      "given",
    );
    expect(course.elimination.map(({ fromH, ratePerH }) => [fromH, ratePerH])).toEqual([
      [0, 0.125],
      [12, 0.05],
      [24, 0.05 + 3.5 / 40],
      [28, 0.05],
    ]);
  });

  test("refuses two changes at one time, and a session that ends before it begins", () => {
    const both = inventedContent({ setting: { ...setting, eliminationChanges: [change, { ...change, id: "c3" }] } });
    expect(() => courseOfContent(both, "given")).toThrow("setting/eliminationChanges/1/from must be another time");
    const forwards = inventedContent({ setting: { ...setting, eliminationChanges: [session] } });
    // The contract refuses such a span at the door; the engine does not rely on it.
    const eliminationChanges = [{ ...session, until: "2026-03-03T07:00:00Z" }];
    const backwards = { ...forwards, setting: { ...forwards.setting, eliminationChanges } };
    expect(() => courseOfContent(backwards, "given")).toThrow(
      "setting/eliminationChanges/0/until must be later than the beginning of the span",
    );
  });

  test("depends on elapsed time only: the same plan a year on gives the same course", () => {
    const later = (text: string) => text.replaceAll("2026-", "2027-");
    const moved = inventedContent({
      setting: {
        ...setting,
        plan: { ...setting.plan, start: later(setting.plan.start) },
        eliminationChanges: [{ ...change, from: later(change.from) }],
      },
      schedule: {
        orders: [
          {
            ...everyEight,
            when: { kind: "every", from: later("2026-03-02T08:00:00Z"), intervalH: 8, end: { kind: "open" } },
          },
        ],
      },
    });
    const there = inventedContent({ setting: { ...setting, eliminationChanges: [change] } });
    expect(courseOfContent(moved, "given").course).toEqual(courseOfContent(there, "given").course);
  });
});
