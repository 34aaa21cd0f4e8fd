import { limits } from "../../shared/contract/limits.ts";
import { scheduleFacts, settingFacts } from "../../shared/figures/facts.ts";
import type { Prepared } from "../../shared/figures/prepared.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import type { Paper } from "./paper.ts";
import { heading, paragraph, table } from "./writing.ts";

const kineticNames = ["volumeL", "clearanceLPerH", "eliminationRatePerH", "halfLifeH"] as const;

/** Every input with its unit and where it came from; what was derived is marked as derived. */
export function writeInputs(paper: Paper, { content, course }: Prepared): void {
  heading(paper, "What was entered");
  const entered = settingFacts(content).map(({ label, words, origin }) => [label, words, origin ?? "typed"]);
  const derived = kineticNames
    .filter((name) => content.setting.kinetics[name] === undefined)
    .map((name) => {
      const { label } = limits[name];
      const from = course.kinetics.given.map((given) => limits[given].label.toLowerCase()).join(" and ");
      return [label, formatQuantity(course.kinetics[name], printedUnit(name), 6), `derived from ${from}`];
    });
  table(
    paper,
    [
      { title: "Input", share: 3 },
      { title: "Value", share: 4, font: "bold" },
      { title: "Where it came from", share: 3.4 },
    ],
    [...entered, ...derived],
  );
  if (content.setting.rangeMgPerL === undefined) paragraph(paper, "No desired range was entered.");
  heading(paper, "Orders, and what was recorded");
  const schedule = scheduleFacts(content).filter(({ path }) => path.startsWith("schedule/"));
  if (schedule.length === 0) paragraph(paper, "Nothing is ordered.");
  else
    table(
      paper,
      [
        { title: "Order", share: 2.6 },
        { title: "Entry", share: 7.4 },
      ],
      schedule.map(({ label, words }) => [label, words]),
    );
}
