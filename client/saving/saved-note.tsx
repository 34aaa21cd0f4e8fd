import type { Revision } from "../../shared/contract/case.ts";
import { sayOpinion } from "./say-opinion.ts";
import { SheetLinks } from "./sheet-links.tsx";

/** What was just saved, and its sheet. */
export function SavedNote({ revision }: { revision: Revision }) {
  return (
    <div class="saved" id="saved-note" tabIndex={-1}>
      <p>
        <strong>Saved as revision {revision.number}.</strong> {sayOpinion(revision)}
      </p>
      <SheetLinks revision={revision} />
    </div>
  );
}
