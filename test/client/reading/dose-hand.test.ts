import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { CaseDocument } from "../../../client/case/case-document.ts";
import { createCaseModel } from "../../../client/case/case-model.ts";
import { formOfSetting } from "../../../client/case/form-of-setting.ts";
import { createDoseHand } from "../../../client/reading/dose-hand.ts";
import { levelAt, predictionOf } from "../../../client/reading/predictions.ts";
import { contentWith, everyTwelve } from "./contents.ts";

/** A case with one alternative, its doses every 12 h from the start of a plan of 72 h. */
function opened(schedule: object = { orders: [everyTwelve] }) {
  const content = contentWith(schedule);
  const document: CaseDocument = {
    label: content.caseLabel,
    timeZone: content.timeZone,
    notes: "",
    form: formOfSetting(content.setting, content.timeZone),
    setting: content.setting,
    alternatives: [{ key: "a", label: "First", schedule: content.schedule, savedNumber: 0, cautionReasons: [] }],
  };
  const model = createCaseModel(document, () => content.setting);
  const hand = createDoseHand(model);
  const doses = () => {
    const prediction = predictionOf(model.contents.value.get("a")!);
    if (!prediction.ok) throw new Error("the case of this test can be computed");
    return prediction.doses;
  };
  return { model, hand, dose: (key: string) => doses().find((each) => each.key === key)! };
}

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

describe("the hand that moves doses", () => {
  test("shows the curve of where the dose is held, before anything is written", () => {
    const { model, hand, dose } = opened();
    hand.take("a", dose("o1#1"));
    hand.moveTo(15);
    const held = predictionOf(hand.held.value!.content);
    if (!held.ok) throw new Error("it can be computed");
    expect(levelAt(held.given, 14)).toBeLessThan(levelAt(held.given, 16));
    expect(dose("o1#1").atH).toBe(12);
    expect(model.canUndo.value).toBe(false);
  });

  test("is one undo step from taking to dropping, however long it rests on the way", () => {
    const { model, hand, dose } = opened();
    hand.take("a", dose("o1#1"));
    for (const atH of [13, 14, 15]) {
      hand.moveTo(atH);
      vi.advanceTimersByTime(500);
      expect(dose("o1#1").atH).toBe(atH);
    }
    hand.drop();
    expect(model.lastChange.value).toBe("Alternative A: dose 2 moved to Mon 2 Mar 2026 23:00");
    model.undo();
    expect(dose("o1#1").atH).toBe(12);
    expect(model.canUndo.value).toBe(false);
    model.redo();
    expect(dose("o1#1").atH).toBe(15);
  });

  test("makes two moves two undo steps", () => {
    const { model, hand, dose } = opened();
    for (const atH of [13, 14]) {
      hand.take("a", dose("o1#1"));
      hand.moveTo(atH);
      hand.drop();
    }
    model.undo();
    expect(dose("o1#1").atH).toBe(13);
  });

  test("puts the dose back, whether it has been written or not", () => {
    for (const restedMs of [0, 500]) {
      const { hand, dose } = opened();
      hand.take("a", dose("o1#1"));
      hand.moveTo(20);
      vi.advanceTimersByTime(restedMs);
      hand.putBack();
      expect(hand.held.value).toBeUndefined();
      expect(dose("o1#1").atH).toBe(12);
    }
  });

  test("writes nothing where nothing was moved", () => {
    const { model, hand, dose } = opened();
    hand.take("a", dose("o1#1"));
    hand.moveTo(12);
    hand.drop();
    expect(model.canUndo.value).toBe(false);
  });

  test("keeps the dose within the plan and says why", () => {
    const { hand, dose } = opened();
    hand.take("a", dose("o1#1"));
    hand.moveTo(-3);
    expect(hand.objection.value).toContain("before the plan starts");
    hand.moveTo(1_000);
    hand.drop();
    expect(dose("o1#1").atH).toBeCloseTo(72 - 1 / 60, 9);
  });

  test("refuses to move what was omitted, and says so until something changes", () => {
    const { model, hand, dose } = opened({
      orders: [everyTwelve],
      records: [{ orderId: "o1", occurrence: 1, outcome: { kind: "omitted" } }],
    });
    hand.take("a", dose("o1#1"));
    hand.moveTo(20);
    expect(hand.held.value).toBeUndefined();
    expect(hand.objection.value).toContain("omitted");
    hand.remove("a", dose("o1#2"));
    expect(hand.objection.value).toBe("");
    expect(model.lastChange.value).toBe("Alternative A: dose 3 deleted");
  });
});
