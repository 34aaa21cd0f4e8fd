import { instantAt, toLocal } from "../../shared/schedule/clock.ts";
import type { CasePage } from "../case/case-page.ts";
import type { SettingField } from "../case/read-setting.ts";
import type { SettingForm } from "../case/setting-form.ts";
import { readMoment } from "../controls/moment.ts";
import { MomentField, sayInstant } from "../controls/moment-field.tsx";
import { readLimited } from "../controls/read-field.ts";
import { TextField } from "../controls/text-field.tsx";
import { refusedAt } from "../saving/refused.ts";
import { KineticsTable } from "./kinetics-table.tsx";
import { StatedRow } from "./stated-row.tsx";
import "./setting-part.css";

/** Who and what drug: the plan's span, the kinetics, what is there at the start, what is wanted. */
export function SettingPart({ page }: { page: CasePage }) {
  const { model } = page;
  const form = page.form.value;
  const timeZone = page.timeZone.value;
  const { problems, missing } = page.reading.value;
  const edit = (what: string, part: Partial<SettingForm>, merge: string) =>
    model.change(what, (document) => ({ ...document, form: { ...document.form, ...part } }), merge);
  const problemOf = (field: SettingField) => problems[field] ?? refusedAt(page, `setting-${field}`);
  return (
    <section class="part" aria-labelledby="setting-title">
      <h2 id="setting-title">Who and what drug</h2>
      <p class="soft">
        All alternatives of the case share what stands here. It is saved with the next revision or with the case.
      </p>
      {missing.length > 0 && (
        <p role="note" class="missing">
          Still needed before anything can be computed: {missing.join("; ")}.
        </p>
      )}
      <h3>The plan</h3>
      <div class="fields">
        <div>
          <MomentField
            id="setting-start"
            label="Start of the plan"
            moment={form.start}
            timeZone={timeZone}
            onMoment={(start) => edit("start of the plan", { start }, "start")}
            emptiness="allowed"
            problem={problemOf("start")}
            hint="24-hour, such as 2026-03-29 08:00; nothing can be given before it"
          />
          {form.start.text.trim() === "" && (
            <button
              type="button"
              class="button"
              onClick={() => edit("start of the plan", { start: { text: todayAtEight(timeZone) } }, "start")}
            >
              Today, 08:00
            </button>
          )}
        </div>
        <TextField
          id="setting-horizonH"
          label="Length of the plan"
          unit="h"
          mode="decimal"
          text={form.horizonH}
          onText={(horizonH) => edit("length of the plan", { horizonH }, "horizonH")}
          problem={problemOf("horizonH")}
          reading={sayEnd(form, timeZone)}
        />
      </div>
      <KineticsTable page={page} />
      <h3>At the start, and what is wanted</h3>
      <div class="stated-list">
        <StatedRow
          id="setting-startConcentration"
          label="Concentration at the start"
          unit="mg/L"
          stated={form.startConcentration}
          onStated={(startConcentration, field) =>
            edit("start concentration", { startConcentration }, `startConcentration ${field}`)
          }
          problem={problemOf("startConcentration")}
          hint="already present then; empty means none"
        />
      </div>
      <div class="fields range-fields">
        <TextField
          id="setting-rangeLow"
          label="Desired range, low end"
          unit="mg/L"
          mode="decimal"
          text={form.rangeLow}
          onText={(rangeLow) => edit("low end of the range", { rangeLow }, "rangeLow")}
          problem={problemOf("rangeLow")}
        />
        <TextField
          id="setting-rangeHigh"
          label="Desired range, high end"
          unit="mg/L"
          mode="decimal"
          text={form.rangeHigh}
          onText={(rangeHigh) => edit("high end of the range", { rangeHigh }, "rangeHigh")}
          problem={problemOf("rangeHigh")}
        />
      </div>
    </section>
  );
}

function sayEnd(form: SettingForm, timeZone: string): string | undefined {
  const start = readMoment(form.start, timeZone, "");
  const length = readLimited("horizonH", form.horizonH);
  return start.ok && length.ok
    ? `ends ${sayInstant(instantAt(start.instant, length.value, timeZone), timeZone)}`
    : undefined;
}

function todayAtEight(timeZone: string): string {
  return `${toLocal(new Date().toISOString(), timeZone).slice(0, 10)} 08:00`;
}
