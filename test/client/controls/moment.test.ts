import { describe, expect, test } from "vitest";
import { momentText, readMoment } from "../../../client/controls/moment.ts";

const london = "Europe/London";

describe("readMoment", () => {
  test("reads a date and 24-hour time in the case's zone", () => {
    expect(readMoment({ text: " 2026-03-28 08:00 " }, london, "From")).toEqual({
      ok: true,
      instant: "2026-03-28T08:00:00Z",
      resolution: "exact",
    });
  });

  // The clock goes forward in London at 01:00 UTC on 29 March 2026 and back at 01:00 UTC on 25 October 2026
  // (EU and UK rule, last Sundays; IANA tz database, zone Europe/London).
  test("a time that does not exist is read later by the gap and says so", () => {
    expect(readMoment({ text: "2026-03-29 01:30" }, london, "From")).toMatchObject({
      resolution: "skipped",
      instant: "2026-03-29T02:30:00+01:00",
    });
  });

  test("of a time that comes twice the first is meant, and the second can be kept", () => {
    const first = readMoment({ text: "2026-10-25 01:30" }, london, "From");
    expect(first).toMatchObject({ resolution: "repeated", instant: "2026-10-25T01:30:00+01:00" });
    const second = first.ok ? first.second : undefined;
    expect(second && Date.parse(second)).toBe(Date.parse("2026-10-25T01:30:00Z"));
    expect(readMoment({ text: "2026-10-25 01:30", instant: second! }, london, "From")).toMatchObject({
      instant: second,
    });
  });

  test("a kept instant keeps its seconds while its text stays, and goes when the text is changed", () => {
    const moment = momentText("2026-03-28T08:00:45Z", london);
    expect(moment.text).toBe("2026-03-28 08:00");
    expect(readMoment(moment, london, "From")).toMatchObject({ instant: "2026-03-28T08:00:45Z" });
    expect(readMoment({ ...moment, text: "2026-03-28 08:01" }, london, "From")).toMatchObject({
      instant: "2026-03-28T08:01:00Z",
    });
  });

  test.for(["2026-03-28", "28.03.2026 08:00", "2026-02-30 08:00", "2026-03-28 24:00", "8 am"])(
    "refuses %s with what is allowed",
    (text) => {
      const read = readMoment({ text }, london, "From");
      expect(read).toMatchObject({ ok: false });
      expect(!read.ok && read.problem).toMatch(/^From must be a date and 24-hour time such as .*, got /);
    },
  );
});
