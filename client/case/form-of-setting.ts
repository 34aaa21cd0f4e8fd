import type { CaseSetting } from "../../shared/contract/setting.ts";
import { momentText } from "../controls/moment.ts";
import type { SettingForm, StatedName, StatedText } from "./setting-form.ts";

const empty: StatedText = { text: "", note: "" };

/** Three days: long enough to see most drugs settle, short enough to read hour by hour. */
const usualHorizonH = "72";

/** A form in which nothing is stated yet. */
export const emptySettingForm: SettingForm = {
  start: { text: "" },
  horizonH: usualHorizonH,
  kinetics: {
    volumeL: empty,
    clearanceLPerH: empty,
    eliminationRatePerH: empty,
    halfLifeH: empty,
    absorptionRatePerH: empty,
    lagH: empty,
    bioavailability: empty,
    saltFactor: empty,
  },
  startConcentration: empty,
  rangeLow: "",
  rangeHigh: "",
  changes: [],
};

/** A setting as its form shows it; the empty form where a case has none yet. */
export function formOfSetting(setting: CaseSetting | undefined, timeZone: string): SettingForm {
  if (setting === undefined) return emptySettingForm;
  const { plan, kinetics, startConcentration, rangeMgPerL, eliminationChanges } = setting;
  const stated = Object.entries(kinetics).map(([name, { value, origin }]) => [
    name as StatedName,
    { text: plainText(value), note: origin.note },
  ]);
  return {
    start: momentText(plan.start, timeZone),
    horizonH: plainText(plan.horizonH),
    kinetics: { ...emptySettingForm.kinetics, ...Object.fromEntries(stated) },
    startConcentration:
      startConcentration === undefined
        ? empty
        : { text: plainText(startConcentration.valueMgPerL), note: startConcentration.origin.note },
    rangeLow: rangeMgPerL === undefined ? "" : plainText(rangeMgPerL.low),
    rangeHigh: rangeMgPerL === undefined ? "" : plainText(rangeMgPerL.high),
    changes: eliminationChanges,
  };
}

/** Every digit of a number, in the form that the strict reader takes back: no exponent. */
export function plainText(value: number): string {
  const text = String(value);
  return text.includes("e") ? value.toFixed(20).replace(/\.?0+$/, "") : text;
}
