import type { ReadonlySignal } from "@preact/signals";
import { useEffect, useMemo } from "preact/hooks";
import { settling } from "../case/settling.ts";

/** A value once it rests, so that long tables do not hold up the curve while a dose is being moved. */
export function useSettled<Value>(source: ReadonlySignal<Value>): ReadonlySignal<Value> {
  const settled = useMemo(() => settling(source), [source]);
  useEffect(() => settled.stop, [settled]);
  return settled.value;
}
