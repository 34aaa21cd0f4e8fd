import { describe, expect, test } from "vitest";
import { levelColumns, tableHours } from "../../../client/reading/level-rows.ts";
import { predictionOf } from "../../../client/reading/predictions.ts";
import { contentWith, onceAtNoon } from "./contents.ts";

describe("tableHours", () => {
  test("keeps to multiples of the step within the window, ends included", () => {
    expect(tableHours({ fromH: 0, toH: 3 }, 1)).toEqual([0, 1, 2, 3]);
    expect(tableHours({ fromH: 0.5, toH: 3.4 }, 1)).toEqual([1, 2, 3]);
    expect(tableHours({ fromH: 0, toH: 0.7 }, 0.25)).toEqual([0, 0.25, 0.5]);
  });

  test("asks for no hour outside the plan, whatever a step such as 0.1 h leaves of rounding", () => {
    const hours = tableHours({ fromH: 0, toH: 0.3 }, 0.1);
    expect(hours.length).toBe(4);
    expect(Math.max(...hours)).toBeLessThanOrEqual(0.3);
  });
});

test("the table holds the value just after a bolus: 750 mg into 40 L at 4 h is 18.75 mg/L (by hand)", () => {
  const prediction = predictionOf(contentWith({ orders: [onceAtNoon] }));
  if (!prediction.ok) throw new Error("it can be computed");
  const [levels] = levelColumns([prediction.given.made], [3, 4]);
  expect(Array.from(levels!)).toEqual([0, 18.75]);
});
