import { createHash } from "node:crypto";
import { describe, expect, test } from "vitest";
import { canonicalJson, sealOf } from "../../db/seal.ts";

describe("canonicalJson", () => {
  test.for([
    // RFC 8785, 3.2.2: the example of serialised numbers, strings and literals.
    {
      value: {
        // biome-ignore lint/correctness/noPrecisionLoss: the RFC has a number that a double cannot hold, to see it rounded
        numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
        string: '€$\u000f\nA\'B"\\\\"/',
        literals: [null, true, false],
      },
      text: '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    },
    // RFC 8785, 3.2.3: keys are sorted by UTF-16 code units.
    {
      value: { "€": 1, "\r": 2, "\ufb33": 3, "1": 4, "😀": 5, "\u0080": 6, ö: 7 },
      text: '{"\\r":2,"1":4,"\u0080":6,"ö":7,"€":1,"😀":5,"\ufb33":3}',
    },
    { value: { b: -0, a: [] }, text: '{"a":[],"b":0}' },
  ])("is $text", ({ value, text }) => {
    expect(canonicalJson(value)).toBe(text);
  });

  test.for([Number.NaN, Number.POSITIVE_INFINITY])("refuses %d, which JSON would write as null", (value) => {
    expect(() => canonicalJson({ value })).toThrow();
  });

  test("refuses undefined", () => {
    expect(() => canonicalJson(undefined)).toThrow("undefined has no JSON form");
  });
});

describe("sealOf", () => {
  test("is the same in whatever order the fields come, and is SHA-256 of the text", () => {
    expect(sealOf({ a: 1, b: 2 })).toBe(sealOf({ b: 2, a: 1 }));
    expect(sealOf({ a: 1 })).toBe(createHash("sha256").update('{"a":1}').digest("hex"));
  });
});
