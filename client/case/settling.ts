import { effect, type ReadonlySignal, signal } from "@preact/signals";

/** While something moves, what is long to draw waits until it has rested for so long. */
const restMs = 80;

export interface Settling<Value> {
  readonly value: ReadonlySignal<Value>;
  stop(): void;
}

/**
 * Follows a value: a change on its own at once, changes that crowd each other (a drag, a held key) when
 * they rest. So the curve can follow the hand while tables and cautions are drawn once.
 */
export function settling<Value>(source: ReadonlySignal<Value>): Settling<Value> {
  const value = signal(source.peek());
  let timer: ReturnType<typeof setTimeout> | undefined;
  let changedAt = Number.NEGATIVE_INFINITY;
  const stop = effect(() => {
    const newest = source.value;
    if (timer === undefined && newest === value.peek()) return;
    const now = performance.now();
    const alone = now - changedAt > restMs;
    changedAt = now;
    clearTimeout(timer);
    if (alone) value.value = newest;
    else
      timer = setTimeout(() => {
        value.value = newest;
      }, restMs);
  });
  return {
    value,
    stop() {
      clearTimeout(timer);
      stop();
    },
  };
}
