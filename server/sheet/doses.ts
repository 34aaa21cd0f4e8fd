import type { Prepared } from "../../shared/figures/prepared.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { givenDoses } from "../../shared/schedule/doses-given.ts";
import { sayGive } from "../../shared/schedule/say-order.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { formatHours } from "../../shared/units/format.ts";
import type { Paper } from "./paper.ts";
import { heading, paragraph, table } from "./writing.ts";

/** A sheet longer than this is not checked by hand; what is left out is said. */
const mostRows = 150;

/** Every dose with its date, its 24-hour time and what became of it. */
export function writeDoses(paper: Paper, { content }: Prepared): void {
  heading(paper, "Doses");
  const doses = givenDoses(content);
  if (doses.length === 0) {
    paragraph(paper, "No dose is given.");
    return;
  }
  const zone = content.timeZone;
  table(
    paper,
    [
      { title: "Number", share: 1.1 },
      { title: "Date and 24-hour time", share: 2.5 },
      { title: "Into the plan", share: 1.4 },
      { title: "DOSE", share: 3.9, font: "bold" },
      { title: "What became of it", share: 3 },
    ],
    doses
      .slice(0, mostRows)
      .map((dose, index) => [
        `${index + 1}`,
        sayClock(dose.at, zone),
        formatHours(dose.atH),
        sayGive(dose.give),
        sayStatus(dose, zone),
      ]),
  );
  if (doses.length > mostRows)
    paragraph(paper, `The first ${mostRows} of ${doses.length} doses are listed; the rest follow the orders above.`);
}

function sayStatus(dose: ScheduledDose, zone: string): string {
  const { status, plannedAt, plannedGive } = dose;
  if (status === "planned") return dose.edited ? "planned, otherwise than its order" : "planned, no record yet";
  if (status === "as-planned") return "given as planned";
  if (status === "omitted") return "OMITTED, not counted";
  if (status === "extra") return "given, not planned";
  return `given otherwise; planned ${sayClock(plannedAt!, zone)}, ${sayGive(plannedGive!)}`;
}
