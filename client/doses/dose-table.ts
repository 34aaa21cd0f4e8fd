import type { Schedule } from "../../shared/contract/case.ts";
import type { Give } from "../../shared/contract/schedule.ts";
import { toLocal } from "../../shared/schedule/clock.ts";
import { amountGivenMg } from "../../shared/schedule/given-amount.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import type { CsvTable } from "../reading/csv-button.tsx";
import { nameOfDose } from "../reading/dose-words.ts";

const outcomes = {
  planned: "nothing recorded",
  "as-planned": "given as planned",
  changed: "given otherwise",
  omitted: "omitted",
  extra: "extra dose",
} as const;

/** The dated doses as a table of numbers for a file; what does not apply to a dose is left empty. */
export function doseTable(doses: readonly ScheduledDose[], schedule: Schedule, timeZone: string): CsvTable {
  const local = (instant: string | undefined) =>
    instant === undefined ? "" : toLocal(instant, timeZone).replace("T", " ");
  return {
    columns: [
      "Dose",
      "Kind",
      `Planned at (${timeZone})`,
      "Planned hours into the plan (h)",
      "Planned amount (mg)",
      "Planned duration (h)",
      "What was given",
      `Given at (${timeZone})`,
      "Given amount (mg)",
      "Given duration (h)",
    ],
    rows: doses.map((dose) => {
      const planned = dose.plannedAt === undefined ? undefined : (dose.plannedGive ?? dose.give);
      const given = dose.status === "omitted" || dose.status === "planned" ? undefined : dose.give;
      return [
        nameOfDose(dose, schedule),
        dose.give.kind,
        local(dose.plannedAt),
        dose.plannedAtH ?? "",
        planned ? amountGivenMg(planned) : "",
        planned ? durationH(planned) : "",
        outcomes[dose.status],
        given ? local(dose.at) : "",
        given ? amountGivenMg(given) : "",
        given ? durationH(given) : "",
      ];
    }),
  };
}

function durationH(give: Give): number | "" {
  if (give.kind === "infusion") return give.durationH;
  return give.kind === "pump" ? (give.steps.at(-1)?.afterH ?? "") : "";
}
