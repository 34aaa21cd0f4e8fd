import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import type { Revision } from "../../shared/contract/case.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { letterOf } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import type { Failure } from "../http/answer.ts";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { ComparePart } from "./compare-part.tsx";
import { SheetLinks } from "./sheet-links.tsx";
import { TakeUp } from "./take-up.tsx";

/** Every revision of the alternative being edited, newest first: its sheet, and the way to take it up again. */
export function RevisionsPart({ page }: { page: CasePage }) {
  const revisions = useSignal<readonly Revision[]>([]);
  const failure = useSignal<Failure | undefined>(undefined);
  const selected = page.selected.value;
  const regimenId = selected?.regimenId;
  const known = page.stored.value.regimens.find(({ id }) => id === regimenId)?.latestRevisionNumber ?? 0;
  useEffect(() => {
    revisions.value = [];
    failure.value = undefined;
    if (regimenId === undefined || known === 0) return;
    let wanted = true;
    void (async () => {
      const { listRevisions } = await import("../http/cases-api.ts");
      const answer = await listRevisions(page.stored.peek().case.id, regimenId);
      if (!wanted) return;
      if (answer.ok) revisions.value = [...answer.value.revisions].sort((one, other) => other.number - one.number);
      else failure.value = answer.failure;
    })();
    return () => {
      wanted = false;
    };
  }, [regimenId, known]);
  if (selected === undefined || known === 0) return null;
  const letter = letterOf(page.settled.value, selected.key);
  return (
    <>
      <h3 id="revisions-title">Revisions of alternative {letter}</h3>
      {failure.value && <FailureNote failure={failure.value} />}
      <div class="scroll-x" role="region" aria-labelledby="revisions-title" tabIndex={0}>
        <table>
          <thead>
            <tr>
              <th scope="col">Number</th>
              <th scope="col">Saved</th>
              <th scope="col">Reason</th>
              <th scope="col">Prepared by</th>
              <th scope="col">Hash</th>
              <th scope="col">Sheet and use</th>
            </tr>
          </thead>
          <tbody>
            {revisions.value.map((revision) => (
              <tr key={revision.id}>
                <th scope="row">{revision.number}</th>
                <td>{sayClock(revision.createdAt, revision.content.timeZone)}</td>
                <td>{revision.reason}</td>
                <td>{revision.preparedBy}</td>
                <td class="hash">{revision.contentHash.slice(0, 12)}</td>
                <td class="revision-use">
                  <SheetLinks revision={revision} />
                  <TakeUp
                    page={page}
                    revision={revision}
                    onTaken={() => announce(`Revision ${revision.number} is taken up; save it as a new revision`)}
                  />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <ComparePart page={page} />
    </>
  );
}
