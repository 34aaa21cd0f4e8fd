import { useSignal } from "@preact/signals";
import { useMemo, useRef } from "preact/hooks";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { figuresOfPrepared } from "../../shared/figures/figures.ts";
import { judge } from "../../shared/figures/judge.ts";
import { lookAt } from "./alternative-look.ts";
import { ClockAxis } from "./clock-axis.tsx";
import { comparisonPicture } from "./comparison-picture.ts";
import { CurveCanvas } from "./curve-canvas.tsx";
import { type FigureColumn, FigureTable } from "./figure-table.tsx";
import { LineSample } from "./line-sample.tsx";
import { predictionOf } from "./predictions.ts";
import { useFresh } from "./use-fresh.ts";
import { usePlotWidth } from "./use-plot-width.ts";
import "./curve-section.css";

interface CurveComparisonProps {
  readonly before: RegimenContent;
  readonly after: RegimenContent;
}

const names = ["Before", "After"] as const;

/** Numbers, because letters mean alternatives here. */
const looks = names.map((_, place) => ({ ...lookAt(place), letter: String(place + 1) }));

/** Two revisions on one chart and one clock, and their figures side by side. */
export function CurveComparison({ before, after }: CurveComparisonProps) {
  const stage = useRef<HTMLDivElement>(null);
  const plotPx = useSignal(600);
  usePlotWidth(stage, plotPx);
  const { picture, ticks } = useMemo(
    () => comparisonPicture({ before, after, looks, plotPx: plotPx.value }),
    [before, after, plotPx.value],
  );
  const newest = useFresh(picture);
  const columns = useMemo(() => columnsOf([before, after]), [before, after]);
  return (
    <div class="comparison">
      <p class="comparison-key">
        {[before, after].map((content, place) => (
          <span key={names[place]}>
            <LineSample look={looks[place]!} /> {names[place]}: {content.regimenLabel}
          </span>
        ))}
      </p>
      <div class="curve-stage" ref={stage}>
        <p class="axis-name">Level, mg/L</p>
        <CurveCanvas picture={newest} label="Curves before and after; the table below holds their figures" />
        <ClockAxis window={picture.window} plotPx={plotPx.value} ticks={ticks} />
      </div>
      <FigureTable caption="Figures before and after" columns={columns} />
    </div>
  );
}

/** Each is judged against its own range; only the best is found by comparing. */
function columnsOf(contents: readonly RegimenContent[]): FigureColumn[] {
  const answers = contents.map((content) => {
    const prediction = predictionOf(content);
    return prediction.ok ? { ok: true as const, figures: figuresOfPrepared(prediction.given) } : prediction;
  });
  const known = answers.flatMap((answer) => (answer.ok ? [answer.figures] : []));
  return contents.map((content, place) => {
    const answer = answers[place]!;
    const own = answer.ok && judge(known, content.setting.rangeMgPerL)[known.indexOf(answer.figures)]!;
    return {
      key: names[place]!,
      title: `${looks[place]!.letter} ${names[place]}`,
      timeZone: content.timeZone,
      answer: answer.ok ? { ...answer, marks: own || {} } : answer,
    };
  });
}
