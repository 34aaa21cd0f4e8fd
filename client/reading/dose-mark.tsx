import { useComputed } from "@preact/signals";
import { useMemo, useRef } from "preact/hooks";
import type { RegimenContent } from "../../shared/contract/case.ts";
import type { CurveView } from "./curve-view.ts";
import { DoseGlyph } from "./dose-glyph.tsx";
import { sayDose } from "./dose-words.ts";
import { frameOnce } from "./frame-once.ts";
import { markId, type PlacedMark, placeOf } from "./mark-layout.ts";
import { pixelAt } from "./plot-scale.ts";
import { snappedH } from "./snap.ts";

interface DoseMarkProps {
  readonly view: CurveView;
  readonly alternativeKey: string;
  readonly content: RegimenContent;
  readonly mark: Extract<PlacedMark, { kind: "dose" }>;
  readonly tabIndex: number;
  readonly onKeyDown: (event: KeyboardEvent) => void;
}

/** A press that moves less than this is a click. */
const slackPx = 4;

interface Drag {
  readonly startPx: number;
  readonly startH: number;
  moved: boolean;
}

/** One dose: dragged by the pointer, moved and deleted by keys, opened for typing by a click or Enter. */
export function DoseMark({ view, alternativeKey, content, mark, tabIndex, onKeyDown }: DoseMarkProps) {
  const { dose } = mark;
  const inHand = useComputed(() => view.hand.inHand(dose.key)).value;
  const place = inHand ? { xPx: pixelAt(inHand.atH, view.window.value, view.plotPx.value), row: 0 } : mark;
  const drag = useRef<Drag | undefined>(undefined);
  const move = useMemo(() => frameOnce((atH: number) => view.hand.moveTo(atH)), [view]);
  const words = sayDose(dose, content.schedule, content.timeZone);
  const moved = (event: PointerEvent) => {
    const now = drag.current;
    const span = view.span.peek();
    if (now === undefined || span === undefined) return;
    const byPx = event.clientX - now.startPx;
    if (!now.moved && Math.abs(byPx) < slackPx) return;
    if (!now.moved) view.hand.take(alternativeKey, dose);
    now.moved = true;
    const { fromH, toH } = view.window.peek();
    const atH = now.startH + (byPx / view.plotPx.peek()) * (toH - fromH);
    move(snappedH(atH, event.altKey ? "free" : view.snap.peek(), span));
  };
  const end = (how: "drop" | "put-back") => {
    move(null);
    if (drag.current?.moved) {
      if (how === "drop") view.hand.drop();
      else view.hand.putBack();
    }
  };
  return (
    <button
      id={markId(dose.key)}
      type="button"
      class={`mark-place dose-mark${inHand ? " dose-held" : ""}`}
      tabIndex={tabIndex}
      aria-label={words}
      title={words}
      style={placeOf(place)}
      onFocus={() => {
        view.activeKey.value = dose.key;
      }}
      onKeyDown={(event) => {
        // What is done next is done to the dose as it was let go.
        if (drag.current === undefined && !event.repeat) view.hand.drop();
        if (event.key === "Escape" && drag.current?.moved) {
          end("put-back");
          drag.current = undefined;
        } else onKeyDown(event);
      }}
      onKeyUp={() => {
        if (drag.current === undefined) view.hand.letGo();
      }}
      onBlur={() => view.hand.drop()}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        event.currentTarget.focus();
        drag.current = { startPx: event.clientX, startH: dose.atH, moved: false };
      }}
      onPointerMove={moved}
      onPointerUp={() => end("drop")}
      onPointerCancel={() => {
        end("put-back");
        drag.current = undefined;
      }}
      onClick={() => {
        // The click that ends a drag is not a request to type.
        if (!drag.current?.moved) view.editing.value = dose.key;
        drag.current = undefined;
      }}
    >
      <DoseGlyph kind={dose.give.kind} status={(inHand ?? dose).status} />
    </button>
  );
}
