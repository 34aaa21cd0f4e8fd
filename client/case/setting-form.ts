import type { DatedEliminationChange, StatedKinetics } from "../../shared/contract/setting.ts";

/** A number as it stands in its field, valid or not, and where it came from. */
export interface StatedText {
  readonly text: string;
  readonly note: string;
}

/**
 * A clock time as it stands in its field. `instant` is kept beside the text because the text alone
 * cannot tell the two 01:30 of an autumn night apart, nor hold seconds.
 */
export interface MomentText {
  readonly text: string;
  readonly instant?: string;
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
