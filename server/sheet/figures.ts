import { figureGroups } from "../../shared/figures/figure-rows.ts";
import { figuresOfPrepared } from "../../shared/figures/figures.ts";
import { judge } from "../../shared/figures/judge.ts";
import type { Prepared } from "../../shared/figures/prepared.ts";
import { sayFigure, sayMoment } from "../../shared/figures/say-figure.ts";
import type { Paper } from "./paper.ts";
import { heading, paragraph, table } from "./writing.ts";

/** All predicted figures with their clock times; those outside the range say so in words. */
export function writeFigures(paper: Paper, prepared: Prepared): void {
  const { content } = prepared;
  const figures = figuresOfPrepared(prepared);
  const [marks] = judge([figures], content.setting.rangeMgPerL);
  heading(paper, "Predicted figures");
  paragraph(
    paper,
    "Predicted from what was given so far and what is planned. The 24 hours of the chosen area begin with the plan.",
  );
  table(
    paper,
    [
      { title: "Figure", share: 3.2 },
      { title: "Predicted", share: 3, font: "bold" },
      { title: "When, and remarks", share: 4.2 },
    ],
    figureGroups.flatMap(({ rows }) =>
      rows.map(({ name, label }) => {
        const figure = figures[name];
        const words = (marks?.[name] ?? []).map((mark) => mark.words.toUpperCase());
        const note = "note" in figure && figure.note !== undefined ? [figure.note] : [];
        return [
          label,
          sayFigure(figure),
          [...words, sayMoment(figure, content.timeZone) ?? "", ...note].filter(Boolean).join("; "),
        ];
      }),
    ),
  );
}
