import type { ComponentChildren } from "preact";
import type { Schedule } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { sayGive } from "../../shared/schedule/say-order.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { formatHours } from "../../shared/units/format.ts";
import { nameOfDose } from "../reading/dose-words.ts";
import { sayOutcome } from "./say-dose.ts";

interface DoseRowProps {
  readonly dose: ScheduledDose;
  readonly schedule: Schedule;
  readonly note: string;
  readonly timeZone: string;
  readonly onEdit: () => void;
  /** The open editor of this dose, if it is open. */
  readonly children: ComponentChildren;
}

/** Id of the button that opens a dose's editor, for the way back. */
export function doseButtonId(key: string): string {
  return `dose-edit-${key.replace(/[^A-Za-z0-9]+/g, "-")}`;
}

/** One dose of the dated table, and its editor below it. */
export function DoseRow({ dose, schedule, note, timeZone, onEdit, children }: DoseRowProps) {
  const name = nameOfDose(dose, schedule);
  const extra = dose.status === "extra";
  return (
    <>
      <tr class={`dose dose-${dose.status}`}>
        <th scope="row">{sayClock(dose.plannedAt ?? dose.at, timeZone)}</th>
        <td>{formatHours(dose.plannedAtH ?? dose.atH)}</td>
        <td>
          <span class="dose-name">{name}</span>
          {dose.edited && <span class="soft"> (planned otherwise)</span>}
        </td>
        <td>{extra ? <span class="soft">not planned</span> : sayGive(dose.plannedGive ?? dose.give)}</td>
        <td>
          {extra ? sayGive(dose.give) : sayOutcome(dose, timeZone)}
          {note && <span class="soft"> ({note})</span>}
        </td>
        <td>
          <button type="button" class="button" id={doseButtonId(dose.key)} onClick={onEdit}>
            Record or change
            <span class="unseen">
              {" "}
              {name}, {sayClock(dose.plannedAt ?? dose.at, timeZone)}
            </span>
          </button>
        </td>
      </tr>
      {children && (
        <tr class="dose-editor">
          <td colSpan={6}>{children}</td>
        </tr>
      )}
    </>
  );
}
