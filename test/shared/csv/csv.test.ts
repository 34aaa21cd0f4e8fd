import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readCsv } from "../../../shared/csv/read-csv.ts";
import { writeCsv } from "../../../shared/csv/write-csv.ts";

describe("writeCsv", () => {
  test("writes RFC 4180: CRLF, quotes only where needed, doubled inside", () => {
    expect(writeCsv(["time (h)", "note"], [[0.5, 'said "now", then left']])).toBe(
      'time (h),note\r\n0.5,"said ""now"", then left"\r\n',
    );
  });

  test.for(["=1+1", "+1", "-1", "@x", "\t=1", "\r=1", "\n=1", "＝1"])(
    "takes the formula out of the text %j",
    (text) => {
      const [, cell] = writeCsv(["a"], [[text]]).split("\r\n");
      expect(cell!.replace(/^"/, "").startsWith("'")).toBe(true);
    },
  );

  test.for(["a\n=1", "a\r=1", "a\t=1", "a;=1"])(
    "keeps %j in one cell, whatever a spreadsheet takes for the end of a line or a field",
    (text) => {
      expect(writeCsv([text], [])).toBe(`"${text}"\r\n`);
    },
  );

  test("leaves numbers as they are, below 0 too", () => {
    expect(writeCsv(["a", "b"], [[-5, 1e-7]])).toBe("a,b\r\n-5,1e-7\r\n");
  });
});

describe("readCsv", () => {
  test("gives back every text that was written", () => {
    const any = fc.oneof(fc.string({ minLength: 1 }), fc.stringMatching(/^['=+@-]{1,4}[a-z]$/));
    const text = any.filter(
      (value) => value.trim() === value && !value.includes("\u0000") && !value.includes("\ufffd"),
    );
    fc.assert(
      fc.property(fc.array(fc.tuple(text, text), { minLength: 1, maxLength: 8 }), (rows) => {
        const table = readCsv(writeCsv(["one", "two"], rows));
        if (!table.ok) throw new Error(table.detail);
        expect(table.rows.slice(1).map(({ cells }) => cells)).toEqual(rows);
      }),
    );
  });

  test("refuses a text without end", () => {
    expect(readCsv("1,2\n".repeat(1_300_000))).toMatchObject({
      ok: false,
      detail: "is longer than 5 million characters",
    });
  });
});
