import { z } from "zod";
import { CautionReason, RegimenId, Schedule } from "../../shared/contract/case.ts";
import { DatedEliminationChange } from "../../shared/contract/setting.ts";
import type { UnsavedWork } from "../case/case-page.ts";

const MomentText = z.strictObject({ text: z.string(), instant: z.string().exactOptional() });
const StatedText = z.strictObject({ text: z.string(), note: z.string() });

const SettingForm = z.strictObject({
  start: MomentText,
  horizonH: z.string(),
  kinetics: z.strictObject({
    volumeL: StatedText,
    clearanceLPerH: StatedText,
    eliminationRatePerH: StatedText,
    halfLifeH: StatedText,
    absorptionRatePerH: StatedText,
    lagH: StatedText,
    bioavailability: StatedText,
    saltFactor: StatedText,
  }),
  startConcentration: StatedText,
  rangeLow: z.string(),
  rangeHigh: z.string(),
  changes: z.array(DatedEliminationChange),
});

const Alternative = z.strictObject({
  key: z.string().min(1),
  regimenId: RegimenId.exactOptional(),
  label: z.string(),
  schedule: Schedule,
  savedNumber: z.int().min(0),
  cautionReasons: z.array(z.strictObject({ ...CautionReason.shape, reason: z.string() })),
});

/** Unsaved work as a browser keeps it. The setting is left out: the form says it. */
const UnsavedForm = z.strictObject({
  format: z.literal("ebbline-unsaved"),
  formatVersion: z.literal(1),
  keptAt: z.iso.datetime(),
  baseVersion: z.int().min(1),
  document: z.strictObject({
    label: z.string(),
    timeZone: z.string(),
    notes: z.string(),
    form: SettingForm,
    alternatives: z.array(Alternative).min(1),
  }),
  drafts: z.record(z.string(), z.record(z.string(), z.string())),
});

export interface KeptWork extends UnsavedWork {
  readonly keptAt: string;
}

/** Unsaved work out of its kept text; undefined where an older release wrote it or it is damaged. */
export function readUnsaved(text: string): KeptWork | undefined {
  const read = UnsavedForm.safeParse(parsed(text));
  if (!read.success) return undefined;
  const { document, drafts, baseVersion, keptAt } = read.data;
  return { document: { ...document, setting: undefined }, drafts, baseVersion, keptAt };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
