import { lookAt } from "./alternative-look.ts";
import type { CurveView } from "./curve-view.ts";
import { EditedLane } from "./edited-lane.tsx";
import { inkOf } from "./line-sample.tsx";
import { PlainLane } from "./plain-lane.tsx";
import { predictionOf } from "./predictions.ts";
import { selectedKeyOf } from "./selected.ts";
import "./ruler.css";

/** One lane of doses per alternative, on the axis of the curves; the selected one can be edited. */
export function Ruler({ view }: { view: CurveView }) {
  const selectedKey = selectedKeyOf(view.model);
  return (
    <div class="ruler">
      {[...view.contents.value].map(([key, content], place) => {
        const prediction = predictionOf(content);
        const doses = prediction.ok ? prediction.doses : [];
        const look = lookAt(place);
        const { letter } = look;
        const selected = key === selectedKey;
        return (
          <div key={key} class={selected ? "lane lane-selected" : "lane"}>
            <button
              type="button"
              class={`lane-head ${inkOf(look)}`}
              id={`lane-${letter}`}
              aria-pressed={selected}
              aria-label={`Edit the doses of alternative ${letter}, ${content.regimenLabel}`}
              onClick={() => {
                view.model.selectedKey.value = key;
              }}
            >
              {letter}
            </button>
            {selected ? (
              <EditedLane view={view} alternativeKey={key} content={content} look={look} doses={doses} />
            ) : (
              <PlainLane view={view} look={look} doses={doses} />
            )}
          </div>
        );
      })}
    </div>
  );
}
