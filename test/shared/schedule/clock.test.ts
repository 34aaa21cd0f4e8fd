import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  hoursBetween,
  instantAt,
  sayClock,
  secondInstant,
  toInstant,
  toLocal,
} from "../../../shared/schedule/clock.ts";

/**
 * Clock changes as the IANA time zone database has them (release in Node's ICU): London last Sundays of
 * March and October; Auckland (southern) last Sunday of September and first of April; Lord Howe Island
 * first Sundays of October and April, by half an hour.
 */
describe("toInstant", () => {
  test.for([
    { local: "2026-03-29 01:30", zone: "Europe/London", instant: "2026-03-29T02:30:00+01:00", resolution: "skipped" },
    { local: "2026-10-25 01:30", zone: "Europe/London", instant: "2026-10-25T01:30:00+01:00", resolution: "repeated" },
    {
      local: "2026-09-27 02:30",
      zone: "Pacific/Auckland",
      instant: "2026-09-27T03:30:00+13:00",
      resolution: "skipped",
    },
    {
      local: "2026-04-05 02:30",
      zone: "Pacific/Auckland",
      instant: "2026-04-05T02:30:00+13:00",
      resolution: "repeated",
    },
    {
      local: "2026-10-04 02:10",
      zone: "Australia/Lord_Howe",
      instant: "2026-10-04T02:40:00+11:00",
      resolution: "skipped",
    },
    {
      local: "2026-04-05 01:45",
      zone: "Australia/Lord_Howe",
      instant: "2026-04-05T01:45:00+11:00",
      resolution: "repeated",
    },
    { local: "2026-03-29T00:59", zone: "Europe/London", instant: "2026-03-29T00:59:00Z", resolution: "exact" },
    { local: "2026-03-29T02:00", zone: "Europe/London", instant: "2026-03-29T02:00:00+01:00", resolution: "exact" },
    { local: "2026-07-01T12:00:30", zone: "Asia/Kathmandu", instant: "2026-07-01T12:00:30+05:45", resolution: "exact" },
  ])("reads $local in $zone as $instant ($resolution)", ({ local, zone, instant, resolution }) => {
    expect(toInstant(local, zone)).toEqual({ instant, resolution });
  });

  test.for([
    "2026-02-30 08:00",
    "2026-01-01 24:00",
    "2026-1-1 08:00",
    "01/02/2026 08:00",
    "2026-01-01 8:00",
    "",
    "1900-01-01 00:00",
  ])("refuses %j", (text) => {
    expect(() => toInstant(text, "UTC")).toThrow("time must be a date and 24-hour time such as 2026-03-29 08:00");
  });

  test("names the second of a time that comes twice, and only then", () => {
    expect(secondInstant("2026-10-25 01:30", "Europe/London")).toBe("2026-10-25T01:30:00Z");
    expect(secondInstant("2026-10-26 01:30", "Europe/London")).toBeUndefined();
  });

  test("gives back the wall clock it was given, wherever that is not skipped", () => {
    const zones = ["Europe/London", "Pacific/Auckland", "Australia/Lord_Howe", "America/New_York", "Asia/Kathmandu"];
    fc.assert(
      fc.property(fc.constantFrom(...zones), fc.integer({ min: 0, max: 2 * 366 * 24 * 4 }), (zone, quarters) => {
        const local = new Date(Date.UTC(2026, 0, 1) + quarters * 900_000).toISOString().slice(0, 16);
        const { instant, resolution } = toInstant(local, zone);
        if (resolution !== "skipped") expect(toLocal(instant, zone)).toBe(local);
        else expect(toLocal(instant, zone) > local).toBe(true);
      }),
      { numRuns: 400 },
    );
  });
});

describe("sayClock", () => {
  test.for([
    ["2026-10-25T01:30:00+01:00", "Europe/London", "Sun 25 Oct 2026 01:30 (UTC+01:00)"],
    ["2026-10-25T01:30:00Z", "Europe/London", "Sun 25 Oct 2026 01:30 (UTC+00:00)"],
    ["2026-10-25T00:59:00+01:00", "Europe/London", "Sun 25 Oct 2026 00:59"],
    ["2026-10-25T02:00:00Z", "Europe/London", "Sun 25 Oct 2026 02:00"],
    ["2026-03-29T02:30:00+01:00", "Europe/London", "Sun 29 Mar 2026 02:30"],
    ["2026-04-05T01:45:00+10:30", "Australia/Lord_Howe", "Sun 5 Apr 2026 01:45 (UTC+10:30)"],
    ["2026-11-01T01:30:00-04:00", "America/New_York", "Sun 1 Nov 2026 01:30 (UTC-04:00)"],
  ] as const)("says %s in %s as %s", ([instant, zone, said]) => {
    expect(sayClock(instant, zone)).toBe(said);
  });
});

describe("instantAt", () => {
  test("counts elapsed hours across a clock change", () => {
    const start = "2026-03-28T20:00:00Z";
    expect(instantAt(start, 12, "Europe/London")).toBe("2026-03-29T09:00:00+01:00");
    expect(hoursBetween(start, "2026-03-29T09:00:00+01:00")).toBe(12);
  });

  test("does not depend on the clock or zone of the machine", () => {
    const before = process.env["TZ"];
    const said = ["America/New_York", "Australia/Lord_Howe", "UTC"].map((machineZone) => {
      process.env["TZ"] = machineZone;
      return [
        toInstant("2026-10-25 01:30", "Europe/London").instant,
        sayClock("2026-03-29T01:30:00Z", "Europe/London"),
      ];
    });
    process.env["TZ"] = before;
    for (const each of said) expect(each).toEqual(["2026-10-25T01:30:00+01:00", "Sun 29 Mar 2026 02:30"]);
  });
});
