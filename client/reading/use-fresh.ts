import { type ReadonlySignal, signal } from "@preact/signals";
import { useLayoutEffect, useMemo } from "preact/hooks";

/** A signal that follows what a component was last drawn with. */
export function useFresh<Value>(value: Value): ReadonlySignal<Value> {
  const fresh = useMemo(() => signal(value), []);
  useLayoutEffect(() => {
    fresh.value = value;
  }, [value]);
  return fresh;
}
