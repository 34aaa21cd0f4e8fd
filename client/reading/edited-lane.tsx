import { useComputed } from "@preact/signals";
import { useLayoutEffect, useRef } from "preact/hooks";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import type { AlternativeLook } from "./alternative-look.ts";
import { type CurveView, follow } from "./curve-view.ts";
import { DoseMark } from "./dose-mark.tsx";
import { LaneBars } from "./lane-bars.tsx";
import { inkOf } from "./line-sample.tsx";
import { keyOfMark, markId, markPx, type PlacedMark, placeMarks, placeOf } from "./mark-layout.ts";
import { pixelAt } from "./plot-scale.ts";
import { predictionOf } from "./predictions.ts";
import { steppedH } from "./snap.ts";

interface EditedLaneProps {
  readonly view: CurveView;
  readonly alternativeKey: string;
  readonly content: RegimenContent;
  readonly look: AlternativeLook;
  readonly doses: readonly ScheduledDose[];
}

/** The doses of the selected alternative: one stop for Tab, the arrow keys do the rest. */
export function EditedLane({ view, alternativeKey, content, look, doses }: EditedLaneProps) {
  const plotPx = view.plotPx.value;
  const window = view.window.value;
  const pixelOf = (atH: number) => pixelAt(atH, window, plotPx);
  const placed = placeMarks(doses, pixelOf, plotPx, {
    heldKey: useComputed(() => view.hand.held.value?.doseKey).value,
    activeKey: view.activeKey.value,
  });
  const stop =
    placed.find((mark) => keyOfMark(mark) === view.activeKey.value) ??
    placed.reduce<PlacedMark | undefined>(first, undefined);
  const single = placed.filter((mark) => mark.kind === "dose");
  const rows = 1 + Math.max(0, ...placed.map(({ row }) => row));
  // The order in the page stays the same while a dose is moved past another, or the moved one would lose the focus.
  const steady = [...placed].sort((one, other) =>
    keyOfMark(one).localeCompare(keyOfMark(other), "en", { numeric: true }),
  );
  const pressed = (event: KeyboardEvent, mark: PlacedMark) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const acted =
      mark.kind === "dose" &&
      actOn(view, alternativeKey, asWritten(view, alternativeKey, mark.dose), event, () =>
        focusNeighbour(placed, mark, look.letter),
      );
    if (!acted && !walkAlong(view, placed, mark, event.key)) return;
    event.preventDefault();
  };
  const lane = useRef<HTMLDivElement>(null);
  const hadFocus = lane.current?.contains(document.activeElement) ?? false;
  useLayoutEffect(() => {
    // The mark that had the focus may have gone: out of view, into a bunch, undone.
    if (hadFocus && document.activeElement === document.body && stop !== undefined)
      document.getElementById(markId(keyOfMark(stop)))?.focus();
  });
  return (
    <div
      ref={lane}
      class={`lane-body ${inkOf(look)}`}
      role="group"
      aria-label={`Doses of alternative ${look.letter} in view`}
      aria-describedby="ruler-keys"
      style={{ width: `${plotPx}px`, height: `${rows * markPx}px` }}
    >
      <LaneBars doses={doses} marks={single} pixelOf={pixelOf} plotPx={plotPx} rows={rows} hand={view.hand} />
      {steady.map((mark) =>
        mark.kind === "dose" ? (
          <DoseMark
            key={mark.dose.key}
            view={view}
            alternativeKey={alternativeKey}
            content={content}
            mark={mark}
            tabIndex={stop === mark ? 0 : -1}
            onKeyDown={(event) => pressed(event, mark)}
          />
        ) : (
          <button
            key={keyOfMark(mark)}
            id={markId(keyOfMark(mark))}
            type="button"
            class="mark-place mark-bunch"
            tabIndex={stop === mark ? 0 : -1}
            aria-label={sayBunch(mark.doses, content)}
            style={placeOf(mark)}
            onFocus={() => {
              view.activeKey.value = keyOfMark(mark);
            }}
            onKeyDown={(event) => pressed(event, mark)}
            onClick={() => zoomTo(view, mark.doses)}
          >
            {mark.doses.length}
          </button>
        ),
      )}
    </div>
  );
}

function first(best: PlacedMark | undefined, each: PlacedMark): PlacedMark {
  return best === undefined || each.xPx < best.xPx ? each : best;
}

function sayBunch(doses: readonly ScheduledDose[], { timeZone }: RegimenContent): string {
  return `${doses.length} doses close together, ${sayClock(doses[0]!.at, timeZone)} to ${sayClock(doses.at(-1)!.at, timeZone)}: show closer`;
}

/** The doses of a bunch with a little around them; the same moment for all of them cannot be zoomed apart, only rowed. */
function zoomTo(view: CurveView, doses: readonly ScheduledDose[]): void {
  const fromH = doses[0]!.atH;
  const lengthH = Math.max(1, doses.at(-1)!.atH - fromH);
  view.activeKey.value = doses[0]!.key;
  view.show({ fromH: fromH - lengthH / 2, toH: fromH + 1.5 * lengthH });
}

/** The dose as it is in the document, which a quick second key finds ahead of what is drawn. */
function asWritten({ model }: CurveView, alternativeKey: string, dose: ScheduledDose): ScheduledDose {
  const content = model.contents.peek().get(alternativeKey);
  const prediction = content && predictionOf(content);
  return (prediction?.ok ? prediction.doses.find(({ key }) => key === dose.key) : undefined) ?? dose;
}

/** Moves, removes or leaves a dose, by its key; false where the key means nothing to it. */
function actOn(
  view: CurveView,
  alternativeKey: string,
  dose: ScheduledDose,
  event: KeyboardEvent,
  onRemoved: () => void,
): boolean {
  const span = view.span.peek();
  const direction = ({ ArrowLeft: -1, ArrowRight: 1 } as const)[event.key as "ArrowLeft" | "ArrowRight"];
  if (direction !== undefined && span !== undefined) {
    // A key that is held down is one undo step, dropped when it is let go; each press is its own.
    if (!event.repeat) view.hand.take(alternativeKey, dose);
    const size = event.shiftKey ? "larger" : "usual";
    view.hand.moveTo(steppedH(view.hand.held.peek()?.atH ?? dose.atH, direction, view.snap.peek(), size, span));
    follow(view, view.hand.held.peek()?.atH ?? dose.atH);
    return true;
  }
  if (event.key === "Delete" || event.key === "Backspace") {
    onRemoved();
    view.hand.remove(alternativeKey, dose);
    return true;
  }
  return false;
}

function walkAlong(view: CurveView, placed: readonly PlacedMark[], mark: PlacedMark, key: string): boolean {
  const inTime = [...placed].sort((one, other) => one.xPx - other.xPx || one.row - other.row);
  const here = inTime.indexOf(mark);
  const target = { ArrowDown: inTime[here + 1], ArrowUp: inTime[here - 1], Home: inTime[0], End: inTime.at(-1) }[key];
  if (!["ArrowDown", "ArrowUp", "Home", "End"].includes(key)) return false;
  if (target !== undefined) {
    view.activeKey.value = keyOfMark(target);
    document.getElementById(markId(keyOfMark(target)))?.focus();
  }
  return true;
}

/** Before a mark goes, the focus moves to its neighbour in time, or to the head of the lane. */
function focusNeighbour(placed: readonly PlacedMark[], mark: PlacedMark, letter: string): void {
  const inTime = [...placed].sort((one, other) => one.xPx - other.xPx);
  const here = inTime.indexOf(mark);
  const target = inTime[here + 1] ?? inTime[here - 1];
  document.getElementById(target === undefined ? `lane-${letter}` : markId(keyOfMark(target)))?.focus();
}
