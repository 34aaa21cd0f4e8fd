import { describe, expect, test } from "vitest";
import { readPumpLog } from "../../../shared/schedule/pump-log.ts";

const setting = { timeZone: "Europe/London", startsAt: "2026-03-02T08:00:00Z" };
const steps = [
  { afterH: 0, rateMgPerH: 50 },
  { afterH: 3.5, rateMgPerH: 0.75 },
  { afterH: 8, rateMgPerH: 0 },
];

describe("readPumpLog", () => {
  test.for([
    ["commas", "0,50\n3.5,0.75\n8,0"],
    ["a heading and CRLF", "time (h),rate (mg/h)\r\n0,50\r\n3.5,0.75\r\n8,0\r\n"],
    ["tabs, as pasted from a spreadsheet", "0\t50\n3.5\t0.75\n8\t0"],
    ["semicolons", "0;50\n3.5;0.75\n8;0"],
    ["a byte order mark and empty lines", "\ufeff0,50\n\n3.5,0.75\n8,0\n\n"],
    ["quotes", '"0","50"\n"3.5","0.75"\n"8","0"'],
    ["local dates and times", "2026-03-02 08:00,50\n2026-03-02T11:30,0.75\n2026-03-02 16:00:00,0"],
  ])("reads a log with %s", ([, source]) => {
    expect(readPumpLog(source!, setting)).toEqual({ ok: true, steps, notes: [] });
  });

  test.for([
    ["0,50\n3,40\n2,0", 3, "the time 2 is not later than the line before it: the log is out of order"],
    ["0,50\n3,\n8,0", 2, "has no rate: the log has a gap here; write 0 where the pump stood still"],
    ["0,50\n,40\n8,0", 2, "has no time"],
    ["0,50\n8,10", 2, "the last rate must be 0 mg/h, so that the log says when the pump stopped, got 10"],
    ["0,50", 1, "the log must hold at least two lines: a rate and a stop"],
    ["", 1, "the log is empty: give lines of time and rate"],
    [
      "0,50\n3,5,0,75\n8,0",
      2,
      "must hold a time and a rate, got 4 fields (3 | 5 | 0 | 75): a decimal comma parts a number in two, write 0.5",
    ],
    ["0;50\n3,5;0,75\n8;0", 2, "the time must be written without a comma, such as 0.5 or 1000, got 3,5"],
    ["0,50\n3,-1\n8,0", 2, "the rate must be from 0 to 1000000 mg/h, got -1"],
    ["0,50\n3,abc\n8,0", 2, "the rate must be a plain number, such as 0.5 or 12, got abc"],
    ["-1,50\n8,0", 1, "the time -1 is before the order's time"],
    [
      "time,rate in mL/h\n0,50\n8,0",
      1,
      "the heading names another unit (time, rate in mL/h): times must be in hours and rates in mg/h",
    ],
    // A first line without a time was once taken for a heading and left out.
    [",50\n3,40\n8,0", 1, "has no time"],
    ["\u0660,50\n3,40\n8,0", 1, "the time must be a plain number, such as 0.5 or 12, got \u0660"],
    ["0,50\n20000,0", 2, "the time 20000 is more than 17568 h after the order's time"],
    [
      "2026-02-30 08:00,50\n2026-03-02 16:00,0",
      1,
      "the time must be a date and 24-hour time such as 2026-03-29 08:00, from the year 1975 to 2199, got 2026-02-30 08:00",
    ],
    [
      "0,50\n2026-03-02 10:00,0",
      2,
      "the time 2026-03-02 10:00 is a date, while the first line counts hours: keep to one way",
    ],
    [
      "2026-03-02 08:00,50\n3.5,0",
      2,
      "the time must be a date and 24-hour time such as 2026-03-29 08:00 like the first line's, got 3.5",
    ],
    ["0\u0000,\u00005\u0000", 1, "the log is not UTF-8 text: save the file as UTF-8, or paste the table"],
    ["0,50\n3,\ufffd\n8,0", 1, "the log is not UTF-8 text: save the file as UTF-8, or paste the table"],
    ['0,50\n"3,40\n8,0', 1, "the log has a quote that is not closed, or one in the middle of a field"],
  ] as const)("refuses %j in line %i: %s", ([source, line, detail]) => {
    const read = readPumpLog(source, setting);
    expect(read.ok).toBe(false);
    if (!read.ok) expect(read.problems.map((problem) => problem.detail)).toContain(detail);
    if (!read.ok && source !== '0,50\n"3,40\n8,0')
      expect(read.problems.some((problem) => problem.line === line)).toBe(true);
  });

  // Each of these was once read as mg/h and hours.
  test.for([
    "time,rate (mg/min)",
    "time,g/h",
    "time,ng/h",
    "time,\u03bcg/h",
    "time,\u00b5g/h",
    "time,mg/kg/h",
    "time,units/h",
    "minutes,rate (mg/h)",
    "time (s),rate",
    "day,mg/h",
    "time,pump rate in percent",
  ])("refuses the units of the heading %j", (heading) => {
    expect(readPumpLog(`${heading}\n0,50\n8,0`, setting)).toEqual({
      ok: false,
      problems: [
        {
          line: 1,
          detail: `the heading names another unit (${heading.replace(",", ", ")}): times must be in hours and rates in mg/h`,
        },
      ],
    });
  });

  test.for([
    ["rate (mg/h),time (h)", "the heading names the rate first (rate (mg/h), time (h)): the time must come first"],
    ["time (h),dose (mg)", "the heading names an amount (time (h), dose (mg)): rates must be in mg/h"],
  ] as const)("refuses the columns of the heading %j", ([heading, detail]) => {
    expect(readPumpLog(`${heading}\n0,50\n8,0`, setting)).toEqual({ ok: false, problems: [{ line: 1, detail }] });
  });

  test.for(["Time,Rate", "hours;mg per hour", "elapsed hours\trate in mg/hr", "Zeit;Rate (mg/h)", "t,R"])(
    "takes the heading %j",
    (heading) => {
      const sign = /[;\t,]/.exec(heading)![0];
      expect(readPumpLog(`${heading}\n0${sign}50\n8${sign}0`, setting).ok).toBe(true);
    },
  );

  test("holds no more lines than an order can, and says no more than helps", () => {
    const lines = (count: number) => Array.from({ length: count }, (_, index) => `${index},1`).join("\n");
    expect(readPumpLog(`${lines(9_999)}\n9999,0`, setting).ok).toBe(true);
    expect(readPumpLog(`${lines(10_000)}\n10000,0`, setting)).toEqual({
      ok: false,
      problems: [{ line: 10_001, detail: "the log must hold at most 10000 lines, got 10001" }],
    });
    const bad = readPumpLog("0,x\n".repeat(10_000), setting);
    expect(bad.ok ? [] : bad.problems).toHaveLength(50);
    expect(readPumpLog(" ".repeat(1_000_001), setting)).toMatchObject({ ok: false });
  });

  test("says which lines it had to resolve on the night the clock goes back", () => {
    const night = { timeZone: "Europe/London", startsAt: "2026-10-25T00:00:00+01:00" };
    const read = readPumpLog("2026-10-25 00:00,50\n2026-10-25 01:30,40\n2026-10-25 08:00,0", night);
    expect(read).toEqual({
      ok: true,
      steps: [
        { afterH: 0, rateMgPerH: 50 },
        { afterH: 1.5, rateMgPerH: 40 },
        { afterH: 9, rateMgPerH: 0 },
      ],
      notes: ["line 2: 2026-10-25 01:30 comes twice that day; the first is taken"],
    });
  });
});
