import { computed, type ReadonlySignal, type Signal, signal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { LevelScale } from "../../shared/figures/bends.ts";
import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { CaseModel } from "../case/case-model.ts";
import { pictureOf } from "./case-picture.ts";
import { type ClockTicks, clockTicks } from "./clock-ticks.ts";
import type { CurvePicture } from "./curve-picture.ts";
import { createDoseHand, type DoseHand } from "./dose-hand.ts";
import { holding, panned, windowWithin, zoomed } from "./plot-scale.ts";
import { selectedKeyOf } from "./selected.ts";
import type { ClockSpan, SnapStep } from "./snap.ts";

/** State and actions of the curve and the ruler below it, which share one horizontal axis. */
export interface CurveView {
  readonly model: CaseModel;
  /** Undefined while the setting has a field to mend. */
  readonly span: ReadonlySignal<ClockSpan | undefined>;
  readonly window: ReadonlySignal<TimeWindow>;
  readonly plotPx: Signal<number>;
  readonly scale: Signal<LevelScale>;
  readonly snap: Signal<SnapStep>;
  /** The cursor, kept within the plan. */
  readonly cursorH: ReadonlySignal<number>;
  readonly hand: DoseHand;
  /** The contents of the case, with the dose in hand where the hand holds it. */
  readonly contents: ReadonlySignal<ReadonlyMap<string, RegimenContent>>;
  /** Keys of what can be drawn, one a line: a text, so that it changes only when they do. */
  readonly keys: ReadonlySignal<string>;
  readonly ticks: ReadonlySignal<ClockTicks>;
  readonly picture: ReadonlySignal<CurvePicture | undefined>;
  /** The dose whose editor is open. */
  readonly editing: Signal<string | undefined>;
  /** The dose that the keyboard is on. */
  readonly activeKey: Signal<string | undefined>;
  moveCursor(atH: number): void;
  zoom(times: number, aroundH?: number): void;
  pan(byH: number): void;
  show(window: TimeWindow | undefined): void;
}

const noPlan: TimeWindow = { fromH: 0, toH: 1 };

export function createCurveView(model: CaseModel): CurveView {
  const setting = computed(() => model.document.value.setting);
  const plan = computed(() => setting.value?.plan);
  const timeZone = computed(() => model.document.value.timeZone);
  const span = computed(() => plan.value && { ...plan.value, timeZone: timeZone.value });
  const horizonH = computed(() => plan.value?.horizonH ?? noPlan.toH);
  const chosen = signal<TimeWindow | undefined>(undefined);
  const window = computed(() =>
    chosen.value ? windowWithin(chosen.value, horizonH.value) : { fromH: 0, toH: horizonH.value },
  );
  const cursorH = computed(() => Math.min(Math.max(0, model.cursorH.value), horizonH.value));
  const plotPx = signal(600);
  const scale = signal<LevelScale>("linear");
  const hand = createDoseHand(model);
  const contents = computed(() => withHeld(model.contents.value, hand.held.value));
  const ticks = computed(() =>
    span.value === undefined ? { ticks: [], stretches: [] } : clockTicks(span.value, window.value, plotPx.value),
  );
  return {
    model,
    span,
    window,
    plotPx,
    scale,
    snap: signal<SnapStep>("15"),
    cursorH,
    hand,
    contents,
    keys: computed(() => [...contents.value.keys()].join("\n")),
    ticks,
    picture: computed(() =>
      span.value === undefined
        ? undefined
        : pictureOf({
            contents: contents.value,
            selectedKey: selectedKeyOf(model),
            window: window.value,
            plotPx: plotPx.value,
            scale: scale.value,
            gridH: ticks.value.ticks.map(({ atH }) => atH),
            range: setting.value?.rangeMgPerL,
            motion: hand.held.value === undefined ? "at-rest" : "in-hand",
          }),
    ),
    editing: signal(undefined),
    activeKey: signal(undefined),
    moveCursor(atH) {
      model.cursorH.value = Math.min(Math.max(0, atH), horizonH.peek());
    },
    zoom(times, aroundH) {
      const now = window.peek();
      const inView = cursorH.peek() >= now.fromH && cursorH.peek() <= now.toH;
      chosen.value = zoomed(
        now,
        times,
        aroundH ?? (inView ? cursorH.peek() : (now.fromH + now.toH) / 2),
        horizonH.peek(),
      );
    },
    pan(byH) {
      chosen.value = panned(window.peek(), byH, horizonH.peek());
    },
    show(wanted) {
      chosen.value = wanted;
    },
  };
}

/** Moves the window, where it must, so that the cursor is in it. */
export function followCursor(view: CurveView): void {
  follow(view, view.cursorH.peek());
}

/** Moves the window, where it must, so that an hour is in it. */
export function follow(view: CurveView, atH: number): void {
  const now = view.window.peek();
  const next = holding(now, atH, view.span.peek()?.horizonH ?? now.toH);
  if (next !== now) view.show(next);
}

/** Only the alternative in hand gets another content. */
function withHeld(
  contents: ReadonlyMap<string, RegimenContent>,
  held: DoseHand["held"]["value"],
): ReadonlyMap<string, RegimenContent> {
  return held !== undefined && contents.has(held.key) ? new Map(contents).set(held.key, held.content) : contents;
}
