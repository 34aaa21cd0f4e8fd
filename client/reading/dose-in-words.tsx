import type { CurveView } from "./curve-view.ts";
import { sayDose } from "./dose-words.ts";
import { predictionOf } from "./predictions.ts";
import { selectedKeyOf } from "./selected.ts";
import { usePaced } from "./use-paced.ts";

/** The dose that the hand or the keyboard is on, in words; below it what was done last. */
export function DoseInWords({ view }: { view: CurveView }) {
  const contents = usePaced(view).value;
  const key = selectedKeyOf(view.model);
  const content = key === undefined ? undefined : contents.get(key);
  const prediction = content && predictionOf(content);
  const dose = prediction?.ok ? prediction.doses.find((each) => each.key === view.activeKey.value) : undefined;
  return (
    <div class="dose-words">
      <p>
        {dose && content
          ? sayDose(dose, content.schedule, content.timeZone)
          : "No dose is marked; choose one on the ruler."}
      </p>
      <p class="soft">{view.hand.objection.value || view.model.lastChange.value}</p>
    </div>
  );
}
