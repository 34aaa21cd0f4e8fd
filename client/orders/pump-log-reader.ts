import { signal } from "@preact/signals";
import type { readPumpLog } from "../../shared/schedule/pump-log.ts";

const loaded = signal<typeof readPumpLog | undefined>(undefined);

/** The reader of pump logs, once it is there. Few orders need it, and it brings a whole CSV parser. */
export function pumpLogReader(): typeof readPumpLog | undefined {
  return loaded.value;
}

/** Fetches the reader; whatever shows a log is drawn again when it is there. */
export async function loadPumpLogReader(): Promise<void> {
  const { readPumpLog } = await import("../../shared/schedule/pump-log.ts");
  loaded.value = readPumpLog;
}
