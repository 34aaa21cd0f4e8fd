import type { DoseRecord } from "../../shared/contract/schedule.ts";
import { type Alternative, withSchedule } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { focusOn } from "../shell/focus.ts";
import { withoutRecord } from "./record-edits.ts";

interface LostRecordsProps {
  readonly page: CasePage;
  readonly alternative: Alternative;
  readonly lost: readonly DoseRecord[];
}

/** What was recorded about doses that the schedule does not have any more, each with the way to take it out. */
export function LostRecords({ page, alternative, lost }: LostRecordsProps) {
  if (lost.length === 0) return null;
  return (
    <>
      <h3>Records whose dose is gone</h3>
      <ul class="entries">
        {lost.map((record) => {
          const name = nameOfRecord(record, alternative);
          return (
            <li key={`${record.orderId}#${record.occurrence}`} class="entry">
              <p>
                {name}: {record.outcome.kind === "omitted" ? "omitted" : "given"}
                {record.note && ` (${record.note})`}
              </p>
              <button
                type="button"
                class="button"
                onClick={() => {
                  page.model.change(`record of ${name} taken out`, (now) =>
                    withSchedule(now, alternative.key, (schedule) =>
                      withoutRecord(schedule, record.orderId, record.occurrence),
                    ),
                  );
                  focusOn("doses-title");
                }}
              >
                Take the record out<span class="unseen"> of {name}</span>
              </button>
            </li>
          );
        })}
      </ul>
    </>
  );
}

function nameOfRecord({ orderId, occurrence }: DoseRecord, { schedule }: Alternative): string {
  const index = schedule.orders.findIndex(({ id }) => id === orderId);
  return `dose ${occurrence + 1} of ${index < 0 ? "an order that is gone" : `order ${index + 1}`}`;
}
