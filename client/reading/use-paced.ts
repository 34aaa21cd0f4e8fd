import { effect, signal } from "@preact/signals";
import { useEffect, useMemo } from "preact/hooks";
import type { CurveView } from "./curve-view.ts";

/** Words that change oftener cannot be read. */
const paceMs = 100;

/** The contents for the words and numbers around the curve: at once, but while a dose is in the hand ten times a second. */
export function usePaced({ contents, hand }: CurveView): CurveView["contents"] {
  const { paced, stop } = useMemo(() => {
    const paced = signal(contents.peek());
    let timer: ReturnType<typeof setTimeout> | undefined;
    const take = () => {
      clearTimeout(timer);
      timer = undefined;
      paced.value = contents.peek();
    };
    const stopEffect = effect(() => {
      void contents.value;
      if (hand.held.value === undefined) take();
      else timer ??= setTimeout(take, paceMs);
    });
    return {
      paced,
      stop() {
        clearTimeout(timer);
        stopEffect();
      },
    };
  }, [contents, hand]);
  useEffect(() => stop, [stop]);
  return paced;
}
