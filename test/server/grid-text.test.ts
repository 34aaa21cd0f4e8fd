import { describe, expect, test } from "vitest";
import { answerWriter } from "../../server/grid-text.ts";
import { refuseNaN } from "../../server/refuse-nan.ts";

const answer = (count: number) => ({
  timesH: Array.from({ length: count }, (_, index) => index * 0.1),
  level: 1,
  text: "µ – 漢",
});

describe("answerWriter", () => {
  test.for([
    { name: "a grid", everyH: 0.1 },
    { name: "times of its own", everyH: undefined },
  ])("writes what JSON.stringify writes, for $name", ({ everyH }) => {
    const write = answerWriter();
    for (const count of [1, 3, 3, 20_001]) {
      const text = write(answer(count), { hours: (count - 1) * 0.1, everyH }).toString();
      expect(text).toBe(JSON.stringify(answer(count)));
    }
  });

  test("does not mix up grids, however many there were", () => {
    const write = answerWriter();
    for (let round = 0; round < 3; round++)
      for (let count = 1; count < 40; count++)
        expect(JSON.parse(write(answer(count), { hours: count, everyH: 0.1 }).toString()).timesH).toHaveLength(count);
  });

  test("writes an answer that has no times", () => {
    expect(answerWriter()({}, { hours: 8, everyH: undefined }).toString()).toBe("{}");
  });
});

describe("refuseNaN", () => {
  test.for([
    { levels: [1, Number.NaN] },
    { peak: { mgPerL: Number.POSITIVE_INFINITY } },
    [[{ a: -Infinity }]],
    Number.NaN,
  ])("finds the figure that is no number in %j", (value) => {
    expect(() => refuseNaN(value, Buffer.from(JSON.stringify(value)))).toThrow("a figure is not a finite number");
  });

  test("lets an answer through that has none", () => {
    const answer = { levels: [0, 1e-300], cautions: [{ text: "NaN, null", none: null, yes: true }] };
    refuseNaN(answer, Buffer.from(JSON.stringify(answer)));
  });
});
