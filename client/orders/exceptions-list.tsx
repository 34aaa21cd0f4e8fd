import type { Order } from "../../shared/contract/schedule.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { formatDose, formatDuration } from "../../shared/units/format.ts";

interface ExceptionsListProps {
  readonly order: Order;
  readonly timeZone: string;
  /** Puts a dose back as the rest of its order. */
  readonly onPutBack: (occurrence: number) => void;
}

/** Doses of an order that are planned otherwise; also those left out, which no table of doses shows. */
export function ExceptionsList({ order, timeZone, onPutBack }: ExceptionsListProps) {
  if (order.exceptions.length === 0) return null;
  return (
    <ul class="entries exceptions" aria-label="Doses planned otherwise">
      {order.exceptions.map((exception) => (
        <li key={exception.occurrence} class="entry">
          <p>{sayException(exception, timeZone)}</p>
          <button type="button" class="button" onClick={() => onPutBack(exception.occurrence)}>
            As the rest<span class="unseen"> again, dose {exception.occurrence + 1}</span>
          </button>
        </li>
      ))}
    </ul>
  );
}

function sayException(exception: Order["exceptions"][number], timeZone: string): string {
  const dose = `dose ${exception.occurrence + 1}`;
  if ("skip" in exception) return `${dose} is left out`;
  const { at, amountMg, durationH } = exception;
  const parts = [
    at !== undefined && `at ${sayClock(at, timeZone)}`,
    amountMg !== undefined && formatDose(amountMg),
    durationH !== undefined && `over ${formatDuration(durationH)}`,
  ];
  return `${dose} is planned otherwise: ${parts.filter(Boolean).join(", ") || "as the rest"}`;
}
