import { describe, expect, test } from "vitest";
import { formOfSetting } from "../../../client/case/form-of-setting.ts";
import { readSettingForm } from "../../../client/case/read-setting.ts";
import { CaseSetting } from "../../../shared/contract/setting.ts";
import { typedSetting } from "./typed-setting.ts";

const zone = "Europe/London";

describe("readSettingForm", () => {
  test("reads any two of V, CL, k and half-life and derives the others", () => {
    const { kinetics, setting, problems } = readSettingForm(typedSetting({ volumeL: "40", clearanceLPerH: "5" }), zone);
    expect(problems).toEqual({});
    expect(kinetics?.eliminationRatePerH).toBe(0.125); // CL / V, by hand
    expect(kinetics?.halfLifeH).toBeCloseTo(5.545, 3); // ln 2 / 0.125, by hand
    expect(setting?.kinetics).toEqual({
      volumeL: { value: 40, origin: { kind: "typed", note: "" } },
      clearanceLPerH: { value: 5, origin: { kind: "typed", note: "" } },
    });
  });

  test("makes a setting that the contract accepts and whose form says the same again", () => {
    const form = typedSetting(
      { volumeL: "40", halfLifeH: "5.5", absorptionRatePerH: "1.2", lagH: "0.25", bioavailability: "0.8" },
      { rangeLow: "5", rangeHigh: "15", startConcentration: { text: "2.5", note: "measured" } },
    );
    const { setting } = readSettingForm(form, zone);
    expect(CaseSetting.parse(setting)).toEqual(setting);
    expect(readSettingForm(formOfSetting(setting, zone), zone).setting).toEqual(setting);
  });

  test("refuses three values that disagree, with how far they are apart", () => {
    const { setting, problems } = readSettingForm(
      typedSetting({ volumeL: "40", clearanceLPerH: "5", halfLifeH: "8" }),
      zone,
    );
    expect(setting).toBeUndefined();
    // 5.545 h by hand; (8 - 5.545) / 5.545 = 44.3 percent.
    expect(problems.halfLifeH).toContain("disagrees with V and CL, which give 5.545\u00a0h: 44.3\u00a0percent apart");
  });

  test("accepts a third value that agrees", () => {
    expect(
      readSettingForm(typedSetting({ volumeL: "40", clearanceLPerH: "5", halfLifeH: "5.55" }), zone).problems,
    ).toEqual({});
  });

  test.for([
    {
      name: "volumeL",
      text: "0.001",
      says: "Volume of distribution must be from 0.01\u00a0L to 50,000\u00a0L, got 0.001\u00a0L",
    },
    { name: "halfLifeH", text: "26280", says: "Half-life must be from 0.01\u00a0h to 9,900\u00a0h, got 26,280\u00a0h" },
    {
      name: "clearanceLPerH",
      text: "0,5",
      says: "Clearance must be written without a comma, such as 0.5 or 1000, got 0,5",
    },
    {
      name: "clearanceLPerH",
      text: "-5",
      says: "Clearance must be from 0.00001\u00a0L/h to 5,000\u00a0L/h, got -5\u00a0L/h",
    },
    { name: "clearanceLPerH", text: "NaN", says: "Clearance must be a plain number, such as 0.5 or 12, got NaN" },
  ] as const)("refuses $name $text, naming field, value and what is allowed", ({ name, text, says }) => {
    const { setting, problems } = readSettingForm(typedSetting({ volumeL: "40", [name]: text }), zone);
    expect(setting).toBeUndefined();
    expect(problems[name]).toBe(says);
  });

  test("refuses two values that lead to an absurd third", () => {
    const { problems } = readSettingForm(typedSetting({ volumeL: "50000", clearanceLPerH: "0.001" }), zone);
    expect(problems.clearanceLPerH).toContain("V and CL give: elimination rate constant 2\u00a0×\u00a010⁻⁸\u00a0per h");
  });

  test("an unfinished form has nothing wrong, only something missing", () => {
    const { setting, problems, missing } = readSettingForm(
      typedSetting({ volumeL: "40" }, { start: { text: "" } }),
      zone,
    );
    expect(setting).toBeUndefined();
    expect(problems).toEqual({});
    expect(missing).toEqual(["the start of the plan", "two independent values of V, CL, k and half-life"]);
  });

  test.for([
    { rangeLow: "5", rangeHigh: "", field: "rangeHigh" },
    { rangeLow: "", rangeHigh: "15", field: "rangeLow" },
    { rangeLow: "15", rangeHigh: "15", field: "rangeHigh" },
  ] as const)("refuses a range of $rangeLow to $rangeHigh at $field", ({ rangeLow, rangeHigh, field }) => {
    const { setting, problems } = readSettingForm(
      typedSetting({ volumeL: "40", clearanceLPerH: "5" }, { rangeLow, rangeHigh }),
      zone,
    );
    expect(setting).toBeUndefined();
    expect(problems[field]).toBeDefined();
  });
});
