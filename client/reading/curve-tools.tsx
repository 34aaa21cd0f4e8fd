import type { LevelScale } from "../../shared/figures/bends.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { SelectField } from "../controls/select-field.tsx";
import type { CurveView } from "./curve-view.ts";
import { type SnapStep, snapSteps } from "./snap.ts";

const scales: readonly { readonly value: LevelScale; readonly label: string }[] = [
  { value: "linear", label: "linear" },
  { value: "logarithmic", label: "logarithmic" },
];

/** What part of the plan is in view, on which axis, and how finely doses and the cursor move. */
export function CurveTools({ view }: { view: CurveView }) {
  const { fromH, toH } = view.window.value;
  const horizonH = view.span.value?.horizonH ?? toH;
  const whole = fromH <= 0 && toH >= horizonH;
  const stepH = (toH - fromH) / 3;
  return (
    <div class="curve-tools">
      <div class="button-row" role="group" aria-label="Part of the plan in view">
        <ViewButton onPress={() => view.zoom(0.5)}>Closer</ViewButton>
        <ViewButton idle={whole} onPress={() => view.zoom(2)}>
          Wider
        </ViewButton>
        <ViewButton idle={fromH <= 0} onPress={() => view.pan(-stepH)}>
          ← Earlier
        </ViewButton>
        <ViewButton idle={toH >= horizonH} onPress={() => view.pan(stepH)}>
          Later →
        </ViewButton>
        <ViewButton idle={whole} onPress={() => view.show(undefined)}>
          Whole plan
        </ViewButton>
      </div>
      <ChoiceField
        id="level-scale"
        legend="Level axis"
        value={view.scale.value}
        choices={scales}
        onChoice={(scale) => {
          view.scale.value = scale;
        }}
      />
      <SelectField
        id="snap-step"
        label="Times move in steps of"
        value={view.snap.value}
        choices={snapSteps.map((value) => ({
          value,
          label: value === "free" ? "free: to the minute" : `${value}\u00a0min`,
        }))}
        onChoice={(value) => {
          view.snap.value = value as SnapStep;
        }}
      />
    </div>
  );
}

interface ViewButtonProps {
  readonly children: string;
  /** Pressing it would change nothing. It stays in reach, or the focus would be lost with the last useful press. */
  readonly idle?: boolean;
  readonly onPress: () => void;
}

function ViewButton({ children, idle = false, onPress }: ViewButtonProps) {
  return (
    <button type="button" class="button" aria-disabled={idle} onClick={idle ? undefined : onPress}>
      {children}
    </button>
  );
}
