import { describe, expect, test } from "vitest";
import { lookAt } from "../../../client/reading/alternative-look.ts";
import { pictureOf } from "../../../client/reading/case-picture.ts";
import { comparisonPicture } from "../../../client/reading/comparison-picture.ts";
import { levelBounds } from "../../../client/reading/curve-picture.ts";
import { contentWith, everyTwelve, onceAtNoon } from "./contents.ts";

const late = [{ orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: "2026-03-02T23:00:00Z" } }];
const broken = { ...onceAtNoon, give: { kind: "absorbed", amountMg: 300 } };

function drawn(motion: "at-rest" | "in-hand" = "at-rest") {
  return pictureOf({
    contents: new Map([
      ["a", contentWith({ orders: [everyTwelve], records: late })],
      ["b", contentWith({ orders: [onceAtNoon] })],
      ["c", contentWith({ orders: [broken] })],
    ]),
    selectedKey: "a",
    window: { fromH: 0, toH: 72 },
    plotPx: 700,
    scale: "linear",
    gridH: [],
    range: { low: 5, high: 15 },
    motion,
  });
}

describe("pictureOf", () => {
  test("has each alternative's letter and dashes, the plan as a thin line only where it was not followed, the selected on top", () => {
    const { lines } = drawn();
    expect(lines.map(({ letter, widthPx }) => `${letter ?? "-"} ${widthPx}`)).toEqual(["B 1.75", "- 1", "A 2.75"]);
    expect(lines[0]!.dash).toEqual(lookAt(1).dash);
  });

  test("leaves out what cannot be computed and keeps the letters of the others", () => {
    expect(drawn().lines.some(({ letter }) => letter === "C")).toBe(false);
  });

  test("draws an alternative that has not changed from the same points again", () => {
    const contents = new Map([["a", contentWith()]]);
    const window = { fromH: 0, toH: 72 };
    const input = {
      contents,
      selectedKey: "a",
      window,
      plotPx: 700,
      scale: "linear",
      gridH: [],
      range: undefined,
      motion: "at-rest",
    } as const;
    expect(pictureOf(input).lines[0]!.points).toBe(pictureOf(input).lines[0]!.points);
  });

  test("lets the others step back while a dose is in the hand", () => {
    const { lines } = drawn("in-hand");
    expect(lines.map(({ widthPx }) => widthPx)).toEqual([1, 1, 2.75]);
  });

  test("names the highest peak and the lowest trough of the selected alternative with their unit", () => {
    const named = drawn().marks.filter(({ text }) => text !== undefined);
    expect(named.map(({ kind }) => kind).sort()).toEqual(["peak", "trough"]);
    for (const { text } of named) expect(text).toMatch(/^(peak|trough) [\d.]+\u00a0mg\/L$/);
  });
});

describe("levelBounds", () => {
  test("holds the range and starts at 0 on a linear axis; shows at most four powers of ten on a logarithmic one", () => {
    const picture = {
      ...drawn(),
      lines: [
        {
          points: [
            { x: 0, y: 0 },
            { x: 1, y: 1e-9 },
            { x: 2, y: 10 },
          ],
          colour: "",
          dash: [],
          widthPx: 1,
        },
      ],
    };
    expect(levelBounds(picture)).toMatchObject({ low: 0 });
    expect(levelBounds(picture).high).toBeGreaterThan(15);
    const log = levelBounds({ ...picture, scale: "logarithmic" });
    expect(log.low).toBeCloseTo(15 / 10_000, 12);
    expect(log.high).toBeGreaterThan(15);
  });
});

describe("comparisonPicture", () => {
  test("puts two plans that start a day apart on one clock", () => {
    const before = contentWith();
    const after = contentWith(
      { orders: [{ ...everyTwelve, when: { ...everyTwelve.when, from: "2026-03-03T08:00:00Z" } }] },
      { plan: { start: "2026-03-03T08:00:00Z", horizonH: 72 } },
    );
    const { picture } = comparisonPicture({ before, after, looks: [lookAt(0), lookAt(1)], plotPx: 500 });
    expect(picture.window).toEqual({ fromH: 0, toH: 96 });
    expect(picture.lines.map(({ points }) => [points[0]!.x, points.at(-1)!.x])).toEqual([
      [0, 72],
      [24, 96],
    ]);
  });
});
