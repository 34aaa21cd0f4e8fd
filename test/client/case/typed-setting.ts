import { emptySettingForm } from "../../../client/case/form-of-setting.ts";
import type { SettingForm, StatedName } from "../../../client/case/setting-form.ts";

/** A form with a start and some kinetic texts; the values are invented. */
export function typedSetting(
  kinetics: Partial<Record<StatedName, string>>,
  rest: Partial<SettingForm> = {},
): SettingForm {
  const stated = Object.entries(kinetics).map(([name, text]) => [name, { text, note: "" }]);
  return {
    ...emptySettingForm,
    start: { text: "2026-03-28 08:00" },
    kinetics: { ...emptySettingForm.kinetics, ...Object.fromEntries(stated) },
    ...rest,
  };
}
