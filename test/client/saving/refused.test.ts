import { describe, expect, test } from "vitest";
import { fieldOfPointer } from "../../../client/saving/refused.ts";

describe("fieldOfPointer", () => {
  test.for([
    ["#/label", "case-label"],
    ["#/setting/kinetics/volumeL/value", "setting-volumeL"],
    ["#/content/setting/kinetics/halfLifeH", "setting-halfLifeH"],
    ["#/content/setting/plan/horizonH", "setting-horizonH"],
    ["#/setting/rangeMgPerL/high", "setting-rangeHigh"],
    ["#/setting/rangeMgPerL", "setting-rangeLow"],
    ["#/content/schedule/orders/2/give/amountMg", "order-2"],
    ["#/content/schedule/extras/0/at", "doses-title"],
    ["#/content/cautionReasons/0/reason", "stops-title"],
    ["#/reason", "save-reason"],
    ["#/preparedBy", "save-preparedBy"],
  ] as const)("%s belongs to %s", ([pointer, id]) => {
    expect(fieldOfPointer(pointer)?.id).toBe(id);
  });

  test("a pointer that no field holds has none", () => {
    expect(fieldOfPointer("#/basedOnNumber")).toBeUndefined();
  });
});
