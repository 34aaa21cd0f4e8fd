import type { Revision } from "../../shared/contract/case.ts";

/** The sheet of one revision, for either kind of paper. */
export function SheetLinks({ revision }: { revision: Revision }) {
  const address = `/api/revisions/${revision.id}/sheet.pdf?paper=`;
  return (
    <span class="button-row">
      <a class="button" href={`${address}A4`} target="_blank" rel="noreferrer">
        Sheet, A4<span class="unseen"> of revision {revision.number}, opens in a new tab</span>
      </a>
      <a class="button" href={`${address}Letter`} target="_blank" rel="noreferrer">
        Sheet, US Letter<span class="unseen"> of revision {revision.number}, opens in a new tab</span>
      </a>
    </span>
  );
}
