import { limits } from "../../shared/contract/limits.ts";
import type { KineticName } from "../../shared/kinetics/disposition.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import type { CasePage } from "../case/case-page.ts";
import { type SettingReading, shortNames } from "../case/read-setting.ts";
import type { StatedName } from "../case/setting-form.ts";
import { refusedAt } from "../saving/refused.ts";
import { StatedRow } from "./stated-row.tsx";

const disposition = Object.keys(shortNames) as KineticName[];
const absorption: readonly { readonly name: StatedName; readonly hint: string }[] = [
  { name: "absorptionRatePerH", hint: "ka; needed for absorbed doses" },
  { name: "lagH", hint: "before absorption begins; empty means none" },
  { name: "bioavailability", hint: "of absorbed doses, from 0 to 1; empty means 1" },
  { name: "saltFactor", hint: "part of the amount that is drug, from 0 to 1; empty means 1" },
];

/** V, CL, k and half-life, of which any two give the rest, and what absorbed doses and salts need. */
export function KineticsTable({ page }: { page: CasePage }) {
  const { model } = page;
  const form = page.form.value;
  const reading = page.reading.value;
  const row = (name: StatedName, hint: string | undefined, said: string | undefined) => (
    <StatedRow
      key={name}
      id={`setting-${name}`}
      label={labelOf(name)}
      unit={printedUnit(name)}
      stated={form.kinetics[name]}
      onStated={(stated, field) =>
        model.change(
          `${limits[name].label.toLowerCase()}${field === "note" ? ", where it came from" : ""}`,
          (document) => ({
            ...document,
            form: { ...document.form, kinetics: { ...document.form.kinetics, [name]: stated } },
          }),
          `${name} ${field}`,
        )
      }
      problem={reading.problems[name] ?? refusedAt(page, `setting-${name}`)}
      reading={reading.problems[name] === undefined ? said : undefined}
      hint={hint}
    />
  );
  return (
    <>
      <h3>Kinetics</h3>
      <p class="soft">Give any two of these four; the other two are derived. A third is accepted where it agrees.</p>
      <div class="stated-list">
        {disposition.map((name) => row(name, undefined, sayDerived(name, reading, form.kinetics[name].text)))}
      </div>
      <h3>Absorption and salt</h3>
      <div class="stated-list">{absorption.map(({ name, hint }) => row(name, hint, undefined))}</div>
    </>
  );
}

function labelOf(name: StatedName): string {
  const short = name === "halfLifeH" ? undefined : shortNames[name as KineticName];
  return short === undefined ? limits[name].label : `${limits[name].label} ${short}`;
}

/** What is derived says from what; a third value that was given says what it was held against. */
function sayDerived(name: KineticName, { kinetics }: SettingReading, text: string): string | undefined {
  if (kinetics === undefined || kinetics.given.includes(name)) return undefined;
  const value = formatQuantity(kinetics[name], printedUnit(name));
  const from = kinetics.given.map((each) => shortNames[each]).join(" and ");
  return text.trim() === ""
    ? `derived from ${from}: ${value}`
    : `agrees with ${from}, which give ${value} and are used`;
}
