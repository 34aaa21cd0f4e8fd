import { describe, expect, test } from "vitest";
import { lettersApart } from "../../../client/reading/letters-apart.ts";

const lines = (...ends: readonly number[]) =>
  ends.map((y, index) => ({
    letter: String.fromCharCode(65 + index),
    colour: "--ink",
    dash: [],
    widthPx: 1,
    points: [{ x: 1, y }],
  }));

describe("lettersApart", () => {
  test("leaves letters where their lines end while there is room", () => {
    const placed = lettersApart({ lines: lines(10, 50) }, (y) => 100 - y, 0);
    expect(placed.map(({ letter, y }) => `${letter} ${y}`)).toEqual(["A 90", "B 50"]);
  });

  test("moves six that end at the top of the plot apart, and none out of it", () => {
    const placed = lettersApart({ lines: lines(90, 91, 92, 93, 94, 95) }, (y) => 100 - y, 4);
    const pixels = placed.map(({ y }) => y).sort((one, other) => one - other);
    expect(placed.length).toBe(6);
    expect(pixels[0]).toBe(4);
    expect(Math.min(...pixels.slice(1).map((y, index) => y - pixels[index]!))).toBeGreaterThanOrEqual(13);
  });
});
