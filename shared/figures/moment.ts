import type { RegimenContent } from "../contract/case.ts";
import type { Instant } from "../contract/schedule.ts";
import { instantAt } from "../schedule/clock.ts";

/** An elapsed hour with its instant in the case's time zone. */
export function momentAt(content: RegimenContent, atH: number): { readonly atH: number; readonly at: Instant } {
  return { atH, at: instantAt(content.setting.plan.start, atH, content.timeZone) };
}
