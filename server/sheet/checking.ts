import type { Revision } from "../../shared/contract/case.ts";
import type { Settled } from "../../shared/figures/prepared.ts";
import type { Paper } from "./paper.ts";
import { needRoom } from "./paper.ts";
import { heading, paragraph, table } from "./writing.ts";

const always = ["Highest level in the plan (mg/L)", "Level at the end of the plan (mg/L)"];

const ofSteadyState = [
  "Accumulation factor A",
  "Peak at steady state (mg/L)",
  "Trough at steady state (mg/L)",
  "Area over 24 h at steady state (mg·h/L)",
  "Loading dose as a bolus, with no drug present (mg)",
];

/** Room for the checker's own results, and for both signatures. */
export function writeChecking(paper: Paper, revision: Revision, settled: Settled): void {
  needRoom(paper, 470);
  heading(paper, "Independent check");
  paragraph(
    paper,
    "Work out your own results from the entries, before looking at the predicted figures; then compare. Two people who look at one result together are not an independent check.",
  );
  paper.doc.moveDown(0.4);
  table(
    paper,
    [
      { title: "Quantity", share: 3.4 },
      { title: "Checker's own result", share: 3.4 },
      { title: "Agrees: yes or no, and remarks", share: 3.4 },
    ],
    [
      "Elimination rate constant k (per h)",
      ...(settled.kind === "cycle" ? ofSteadyState : []),
      ...always,
      "Entries compared with their source",
    ].map((quantity) => [quantity, "", ""]),
    8.2,
    25,
  );
  table(
    paper,
    [
      { title: "Who", share: 2.2 },
      { title: "Name and role", share: 3.2 },
      { title: "Signature", share: 2.8 },
      { title: "Date and 24-hour time", share: 2.2 },
    ],
    [
      ["Prepared by", revision.preparedBy, "", ""],
      ["Independently checked by", "", "", ""],
    ],
    8.2,
    34,
  );
}
