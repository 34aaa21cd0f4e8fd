import type { z } from "zod";
import type { Give, Instant, PartId } from "../contract/schedule.ts";

type Id = z.infer<typeof PartId>;

/** What became of a dose: nothing recorded yet, recorded as planned, otherwise, not at all, or never planned. */
export type DoseStatus = "planned" | "as-planned" | "changed" | "omitted" | "extra";

/** One dose with its place in time, in clock time and in elapsed hours from the plan's start. */
export interface ScheduledDose {
  /** "orderId#occurrence", or "extra:id". */
  readonly key: string;
  readonly orderId?: Id;
  /** 0 is the order's first dose; it stays the same when other doses are skipped or moved. */
  readonly occurrence?: number;
  readonly extraId?: Id;
  readonly give: Give;
  /** Where it stands in the plan; absent for an extra dose. */
  readonly plannedAt?: Instant;
  readonly plannedAtH?: number;
  readonly plannedGive?: Give;
  readonly at: Instant;
  readonly atH: number;
  readonly status: DoseStatus;
  /** Planned otherwise than the rest of its order. */
  readonly edited: boolean;
}

/** In the order of time; at one time, in the order they were listed. */
export function inTimeOrder(doses: readonly ScheduledDose[]): ScheduledDose[] {
  return [...doses].sort((one, other) => one.atH - other.atH);
}
