import type { DatedEliminationChange, StatedKinetics } from "../../shared/contract/setting.ts";
import type { MomentText } from "../controls/moment.ts";

/** A number as it stands in its field, valid or not, and where it came from. */
export interface StatedText {
  readonly text: string;
  readonly note: string;
}

export type StatedName = keyof StatedKinetics;

/** Who and what drug, as typed. Nothing typed is dropped for being invalid or unfinished. */
export interface SettingForm {
  readonly start: MomentText;
  readonly horizonH: string;
  readonly kinetics: Readonly<Record<StatedName, StatedText>>;
  readonly startConcentration: StatedText;
  readonly rangeLow: string;
  readonly rangeHigh: string;
  readonly changes: readonly DatedEliminationChange[];
}
