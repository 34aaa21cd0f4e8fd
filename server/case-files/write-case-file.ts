import { standingCaution } from "../../shared/cautions/standing.ts";
import type { Case, CaseFile, Regimen, Revision } from "../../shared/contract/case.ts";

/** A case as a file: all that was entered and saved, and nothing that can be computed again. */
export function writeCaseFile(
  kase: Case,
  regimens: readonly { readonly regimen: Regimen; readonly revisions: readonly Revision[] }[],
  exportedAt: string,
): CaseFile {
  const { label, timeZone, notes, setting } = kase;
  return {
    format: "ebbline-case",
    formatVersion: 1,
    exportedAt,
    case: { label, timeZone, notes, ...(setting !== undefined && { setting }) },
    regimens: regimens.map(({ regimen, revisions }) => ({
      label: regimen.label,
      retired: regimen.retired,
      revisions: [...revisions]
        .sort((one, other) => one.number - other.number)
        .map(({ number, createdAt, reason, preparedBy, content, contentHash }) => ({
          number,
          createdAt,
          reason,
          preparedBy,
          content,
          contentHash,
        })),
    })),
    cautions: [standingCaution],
  };
}
