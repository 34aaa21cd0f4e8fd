import { type LimitName, limits } from "../../shared/contract/limits.ts";
import type { CaseSetting, StatedKinetics } from "../../shared/contract/setting.ts";
import {
  type KineticName,
  type Kinetics,
  type KineticValues,
  resolveKinetics,
} from "../../shared/kinetics/disposition.ts";
import { formatPercent, formatQuantity } from "../../shared/units/format.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import { readMoment } from "../controls/moment.ts";
import { readLimited, readOptional } from "../controls/read-field.ts";
import type { SettingForm, StatedName, StatedText } from "./setting-form.ts";

/** Fields of the setting that can have a problem; each is also the end of its element's id. */
export type SettingField = "start" | "horizonH" | StatedName | "startConcentration" | "rangeLow" | "rangeHigh";

/** What a form says, what is wrong with it, and what its kinetics lead to. */
export interface SettingReading {
  readonly setting?: CaseSetting;
  readonly problems: Readonly<Partial<Record<SettingField, string>>>;
  /** Absent until two independent values are there and agree. */
  readonly kinetics?: Kinetics;
  /** What is still to be filled in, which is not yet wrong. */
  readonly missing: readonly string[];
}

/** What a value is called in a sentence. */
export const shortNames: Readonly<Record<KineticName, string>> = {
  volumeL: "V",
  clearanceLPerH: "CL",
  eliminationRatePerH: "k",
  halfLifeH: "half-life",
};

const kineticNames = Object.keys(shortNames) as KineticName[];
const statedNames: readonly StatedName[] = [
  ...kineticNames,
  "absorptionRatePerH",
  "lagH",
  "bioavailability",
  "saltFactor",
];

/** Reads a whole form: every field strictly, nothing guessed, all problems at once. */
export function readSettingForm(form: SettingForm, timeZone: string): SettingReading {
  const problems: Partial<Record<SettingField, string>> = {};
  const missing: string[] = [];
  const note = (field: SettingField, problem: string): undefined => {
    problems[field] = problem;
  };
  const plan = readPlan(form, timeZone, note, missing);
  const stated = readStated(form, note);
  const kinetics = readKinetics(stated, problems, note, missing);
  const range = readRange(form, note);
  const startConcentration = numberIn(
    "concentrationMgPerL",
    form.startConcentration.text,
    "startConcentration",
    note,
    "Start concentration",
  );
  const partial = { problems, missing, ...(kinetics !== undefined && { kinetics }) };
  if (plan === undefined || kinetics === undefined || Object.keys(problems).length > 0) return partial;
  const setting: CaseSetting = {
    plan,
    kinetics: stated,
    eliminationChanges: [...form.changes],
    ...(startConcentration !== undefined && {
      startConcentration: { valueMgPerL: startConcentration, origin: originOf(form.startConcentration) },
    }),
    ...(range !== undefined && { rangeMgPerL: range }),
  };
  return { ...partial, setting };
}

/** For the case model: the setting alone. */
export function readSetting(form: SettingForm, timeZone: string): CaseSetting | undefined {
  return readSettingForm(form, timeZone).setting;
}

type Note = (field: SettingField, problem: string) => undefined;

function readPlan(form: SettingForm, timeZone: string, note: Note, missing: string[]): CaseSetting["plan"] | undefined {
  if (form.start.text.trim() === "") missing.push("the start of the plan");
  const start = form.start.text.trim() === "" ? undefined : readMoment(form.start, timeZone, "Start of the plan");
  const length = readLimited("horizonH", form.horizonH);
  if (start?.ok === false) note("start", start.problem);
  if (!length.ok) note("horizonH", length.problem);
  return start?.ok === true && length.ok ? { start: start.instant, horizonH: length.value } : undefined;
}

function readStated(form: SettingForm, note: Note): StatedKinetics {
  const entries = statedNames.flatMap((name) => {
    const value = numberIn(name, form.kinetics[name].text, name, note);
    return value === undefined ? [] : [[name, { value, origin: originOf(form.kinetics[name]) }] as const];
  });
  return Object.fromEntries(entries);
}

function readKinetics(
  stated: StatedKinetics,
  problems: Partial<Record<SettingField, string>>,
  note: Note,
  missing: string[],
): Kinetics | undefined {
  const values: KineticValues = Object.fromEntries(
    kineticNames.flatMap((name) => (stated[name] ? [[name, stated[name].value]] : [])),
  );
  const resolved = resolveKinetics(values);
  if (resolved.ok) return derivedProblems(resolved.kinetics, note) ? undefined : resolved.kinetics;
  const { field } = resolved;
  if (values[field] !== undefined) return note(field, disagreement(values, field));
  const wrong = kineticNames.some((name) => problems[name] !== undefined);
  if (!wrong) missing.push("two independent values of V, CL, k and half-life");
  return undefined;
}

/** Two values that are each allowed can lead to a third that is absurd. */
function derivedProblems(kinetics: Kinetics, note: Note): boolean {
  const absurd = kineticNames.find((name) => {
    const [low, high] = limits[name].hard;
    return !(kinetics[name] >= low && kinetics[name] <= high);
  });
  if (absurd === undefined) return false;
  const [low, high] = limits[absurd].hard;
  const say = (value: number) => formatQuantity(value, printedUnit(absurd));
  const from = kinetics.given.map((name) => shortNames[name]).join(" and ");
  note(
    kinetics.given[1] ?? absurd,
    `${from} give: ${limits[absurd].label.toLowerCase()} ${say(kinetics[absurd])}, which must be from ${say(low)} to ${say(high)}`,
  );
  return true;
}

function disagreement(values: KineticValues, field: KineticName): string {
  const others = resolveKinetics(Object.fromEntries(Object.entries(values).filter(([name]) => name !== field)));
  const stated = values[field] ?? Number.NaN;
  if (!others.ok) return `${limits[field].label} disagrees with the other values`;
  const derived = others.kinetics[field];
  const from = others.kinetics.given.map((name) => shortNames[name]).join(" and ");
  const say = (value: number) => formatQuantity(value, printedUnit(field));
  const apart = formatPercent((100 * Math.abs(stated - derived)) / derived);
  return `${limits[field].label} ${say(stated)} disagrees with ${from}, which give ${say(derived)}: ${apart} apart. Leave one of the three empty, or mend it`;
}

function readRange(form: SettingForm, note: Note): CaseSetting["rangeMgPerL"] | undefined {
  const low = numberIn("concentrationMgPerL", form.rangeLow, "rangeLow", note, "Low end of the range");
  const high = numberIn("concentrationMgPerL", form.rangeHigh, "rangeHigh", note, "High end of the range");
  const lowEmpty = form.rangeLow.trim() === "";
  const highEmpty = form.rangeHigh.trim() === "";
  if (lowEmpty && !highEmpty)
    note("rangeLow", "Low end of the range is empty while the high end is given; write 0 mg/L for no low end");
  if (highEmpty && !lowEmpty) note("rangeHigh", "High end of the range is empty while the low end is given");
  if (low === undefined || high === undefined) return undefined;
  if (high > low) return { low, high };
  const say = (value: number) => formatQuantity(value, "mg/L");
  return note("rangeHigh", `High end of the range must be above the low end (${say(low)}), got ${say(high)}`);
}

function numberIn(name: LimitName, text: string, field: SettingField, note: Note, label?: string): number | undefined {
  const read = readOptional(name, text, label);
  if (read === undefined) return undefined;
  return read.ok ? read.value : note(field, read.problem);
}

function originOf({ note }: StatedText): { kind: "typed"; note: string } {
  return { kind: "typed", note };
}
