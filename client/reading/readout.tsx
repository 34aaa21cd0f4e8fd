import { useComputed } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { RangeMgPerL } from "../../shared/contract/dose.ts";
import { formatLevel } from "../../shared/units/format.ts";
import { lookAt } from "./alternative-look.ts";
import { sayHour } from "./cursor-words.ts";
import type { CurveView } from "./curve-view.ts";
import { LineSample } from "./line-sample.tsx";
import { levelAt, predictionOf } from "./predictions.ts";
import { selectedKeyOf } from "./selected.ts";
import { usePaced } from "./use-paced.ts";

/** Which line is which, and the level of each at the cursor. */
export function Readout({ view }: { view: CurveView }) {
  const contents = [...usePaced(view).value];
  const when = useComputed(() => view.span.value && sayHour(view.cursorH.value, view.span.value)).value;
  if (when === undefined) return null;
  const followed = contents.some(([, content]) => {
    const prediction = predictionOf(content);
    return prediction.ok && prediction.planned !== undefined;
  });
  return (
    <div class="scroll-x" role="region" aria-label="Levels at the cursor" tabIndex={0}>
      <table class="readout">
        <caption>
          Levels at the cursor: <strong>{when}</strong>
        </caption>
        <thead>
          <tr>
            <th scope="col">Line</th>
            <th scope="col">Alternative</th>
            <th scope="col">{followed ? "As given so far" : "Level"}</th>
            {followed && <th scope="col">As planned (thin line)</th>}
            <th scope="col">Desired range</th>
          </tr>
        </thead>
        <tbody>
          {contents.map(([key, content], place) => (
            <ReadoutRow
              key={key}
              view={view}
              content={content}
              place={place}
              selected={key === selectedKeyOf(view.model)}
              followed={followed}
            />
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface ReadoutRowProps {
  readonly view: CurveView;
  readonly content: RegimenContent;
  readonly place: number;
  readonly selected: boolean;
  readonly followed: boolean;
}

function ReadoutRow({ view, content, place, selected, followed }: ReadoutRowProps) {
  const prediction = predictionOf(content);
  const atH = view.cursorH.value;
  const head = (
    <>
      <td>
        <LineSample look={lookAt(place)} />
      </td>
      <th scope="row">
        {content.regimenLabel}
        {selected && <span class="soft"> (being edited)</span>}
      </th>
    </>
  );
  if (!prediction.ok)
    return (
      <tr>
        {head}
        <td colSpan={followed ? 3 : 2} class="readout-problem">
          Cannot be computed: {prediction.problem}
        </td>
      </tr>
    );
  const mgPerL = levelAt(prediction.given, atH);
  return (
    <tr>
      {head}
      <td class="number">{formatLevel(mgPerL)}</td>
      {followed && (
        <td class="number">{prediction.planned ? formatLevel(levelAt(prediction.planned, atH)) : "the same"}</td>
      )}
      <td>{sayAgainst(mgPerL, content.setting.rangeMgPerL)}</td>
    </tr>
  );
}

/** Where a level stands against the desired range, in words. */
export function sayAgainst(mgPerL: number, range: RangeMgPerL | undefined): string {
  if (range === undefined) return "none given";
  if (mgPerL > range.high) return "▲ above";
  return mgPerL < range.low ? "▼ below" : "within";
}
