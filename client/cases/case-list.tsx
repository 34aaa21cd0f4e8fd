import type { Case } from "../../shared/contract/case.ts";
import { sayInstant } from "../controls/moment-field.tsx";
import { followHere } from "../routes.ts";

interface CaseListProps {
  /** Undefined while they are being loaded. */
  readonly cases: readonly Case[] | undefined;
  readonly sought: string;
  readonly onMove: (each: Case) => void;
}

/** The cases found, each with the way to open it, to its file, and into or out of the archive. */
export function CaseList({ cases, sought, onMove }: CaseListProps) {
  if (cases === undefined) return <p role="status">Loading …</p>;
  if (cases.length === 0)
    return (
      <p role="status">
        {sought.trim() === "" ? "No case here yet." : `No case has “${sought}” in its label or notes.`}
      </p>
    );
  return (
    <ul class="case-list">
      {cases.map((each) => (
        <li key={each.id}>
          <div>
            <a class="case-name" href={`/cases/${each.id}`} onClick={followHere}>
              {each.label}
            </a>
            {each.demo && <span class="case-demo">invented demonstration</span>}
            <p class="soft">
              changed {sayInstant(each.changedAt, each.timeZone)}; {each.timeZone}
            </p>
            {each.notes && <p class="case-notes">{firstLine(each.notes)}</p>}
          </div>
          <div class="button-row">
            <a class="button" href={`/api/cases/${each.id}/file`} download>
              JSON file<span class="unseen"> of {each.label}</span>
            </a>
            <button type="button" class="button" onClick={() => onMove(each)}>
              {each.archived ? "Bring back" : "Archive"}
              <span class="unseen"> {each.label}</span>
            </button>
          </div>
        </li>
      ))}
    </ul>
  );
}

function firstLine(notes: string): string {
  const [line = ""] = notes.split("\n");
  return line.length > 140 ? `${line.slice(0, 139)}…` : line;
}
