import { useComputed } from "@preact/signals";
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
  return (
    <div class="ruler">
      {view.keys.value.split("\n").map((key, place) => (
        <Lane key={key} view={view} alternativeKey={key} place={place} />
      ))}
    </div>
  );
}

interface LaneProps {
  readonly view: CurveView;
  readonly alternativeKey: string;
  readonly place: number;
}

/** Drawn anew only when its own alternative is written: a dose in the hand moves its own mark alone. */
function Lane({ view, alternativeKey, place }: LaneProps) {
  const content = useComputed(() => view.model.contents.value.get(alternativeKey)).value;
  const selected = useComputed(() => selectedKeyOf(view.model) === alternativeKey).value;
  if (content === undefined) return null;
  const look = lookAt(place);
  const prediction = predictionOf(content);
  const doses = prediction.ok ? prediction.doses : [];
  return (
    <div class={selected ? "lane lane-selected" : "lane"}>
      <button
        type="button"
        class={`lane-head ${inkOf(look)}`}
        id={`lane-${look.letter}`}
        aria-pressed={selected}
        aria-label={`Edit the doses of alternative ${look.letter}, ${content.regimenLabel}`}
        onClick={() => {
          view.model.selectedKey.value = alternativeKey;
        }}
      >
        {look.letter}
      </button>
      {selected ? (
        <EditedLane view={view} alternativeKey={alternativeKey} content={content} look={look} doses={doses} />
      ) : (
        <PlainLane view={view} look={look} doses={doses} />
      )}
    </div>
  );
}
