import type { RegimenContent } from "../../shared/contract/case.ts";
import type { DoseRecord } from "../../shared/contract/schedule.ts";
import { DomainError } from "../../shared/errors.ts";
import { givenDoses, recordsWithoutDose } from "../../shared/schedule/doses-given.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

export interface DatedDoses {
  readonly doses: readonly ScheduledDose[];
  /** Records of doses that the schedule does not have any more. */
  readonly lost: readonly DoseRecord[];
}

/** Every dose of an alternative, omitted ones too; none where it cannot be computed, which the orders say. */
export function datedDoses(content: RegimenContent | undefined): DatedDoses {
  const none = { doses: [], lost: [] };
  if (content === undefined) return none;
  try {
    return { doses: givenDoses(content), lost: recordsWithoutDose(content) };
  } catch (error) {
    if (error instanceof DomainError) return none;
    throw error;
  }
}
