import { useSignal } from "@preact/signals";
import type { CasePage } from "../case/case-page.ts";
import type { Failure } from "../http/answer.ts";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { hasRoom } from "./alternative-edits.ts";
import { bringBack } from "./retire.ts";

/** Alternatives that were retired, each with the way back. */
export function RetiredList({ page }: { page: CasePage }) {
  const failure = useSignal<Failure | undefined>(undefined);
  const retired = page.stored.value.regimens.filter((regimen) => regimen.retired);
  if (retired.length === 0) return null;
  return (
    <details>
      <summary>{retired.length === 1 ? "1 retired alternative" : `${retired.length} retired alternatives`}</summary>
      <ul class="entries">
        {retired.map((regimen) => (
          <li key={regimen.id} class="entry">
            <p>
              {regimen.label} <span class="soft">({sayRevisions(regimen.latestRevisionNumber)})</span>
            </p>
            <button
              type="button"
              class="button"
              disabled={!hasRoom(page.settled.value)}
              onClick={async () => {
                failure.value = await bringBack(page, regimen);
                if (failure.value === undefined) announce(`${regimen.label} is brought back`);
                focusOn("alternatives-title");
              }}
            >
              Bring back<span class="unseen"> {regimen.label}</span>
            </button>
          </li>
        ))}
      </ul>
      {failure.value && <FailureNote failure={failure.value} />}
    </details>
  );
}

function sayRevisions(count: number): string {
  if (count === 0) return "never saved";
  return count === 1 ? "1 revision" : `${count} revisions`;
}
