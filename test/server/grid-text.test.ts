import { describe, expect, test } from "vitest";
import { answerWriter } from "../../server/grid-text.ts";
import { refuseNaN } from "../../server/refuse-nan.ts";

const rest = { level: 1, text: "µ – 漢" };
const times = (count: number, grid: string | undefined) => ({
  grid,
  make: () => Array.from({ length: count }, (_, index) => index * 0.1),
});

describe("answerWriter", () => {
  test.for([
    { name: "a grid", grid: (count: number) => `${count}` },
    { name: "times of its own", grid: () => undefined },
  ])("writes what JSON.stringify writes, for $name", ({ grid }) => {
    const write = answerWriter();
    for (const count of [1, 3, 3, 20_001]) {
      const asked = times(count, grid(count));
      expect(write(rest, asked).toString()).toBe(JSON.stringify({ timesH: asked.make(), ...rest }));
    }
  });

  test("does not mix up grids, however many there were", () => {
    const write = answerWriter();
    for (let round = 0; round < 3; round++)
      for (let count = 1; count < 40; count++)
        expect(JSON.parse(write(rest, times(count, `${count}`)).toString()).timesH).toHaveLength(count);
  });

  test("makes the times of a grid once", () => {
    const write = answerWriter();
    let made = 0;
    const counted = { grid: "24 1", make: () => [0, ++made] };
    for (let round = 0; round < 3; round++) write(rest, counted);
    expect(made).toBe(1);
  });

  test("writes an answer that has no times", () => {
    expect(answerWriter()(rest, undefined).toString()).toBe(JSON.stringify(rest));
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
