import { z } from "zod";
import { contentHashOf } from "../../db/seal.ts";
import { CaseFile } from "../../shared/contract/case.ts";
import { counts } from "../../shared/contract/limits.ts";
import { fieldProblems } from "../field-problems.ts";
import { read } from "../read.ts";
import { type FieldProblem, pointerTo, RequestError } from "../request-errors.ts";
import { sayIssue } from "../say-issue.ts";

const Heading = z.looseObject({ format: CaseFile.shape.format, formatVersion: CaseFile.shape.formatVersion });

/**
 * A case file that is whole: ours, of a version we know, each revision numbered in order and with the
 * hash of what it says.
 *
 * @throws {RequestError} naming each fault
 */
export function readCaseFile(body: unknown): CaseFile {
  // Format and version first: what a later version looks like inside says nothing to the reader.
  const heading = Heading.safeParse(body, { error: sayIssue });
  if (!heading.success) {
    const errors = fieldProblems(heading.error, body);
    throw new RequestError("case-file", "only a case file of version 1 can be read", { errors });
  }
  const file = read(CaseFile, body);
  const errors = file.regimens.flatMap((regimen, index) => faultsOf(regimen, ["regimens", index]));
  const active = file.regimens.filter(({ retired }) => !retired).length;
  if (active > counts.alternatives)
    errors.push({
      pointer: "#/regimens",
      detail: `must hold at most ${counts.alternatives} alternatives that are not retired, got ${active}`,
    });
  if (errors.length > 0)
    throw new RequestError("case-file", "the file was changed after it was written, or is not whole", {
      errors: errors.slice(0, 50),
    });
  return file;
}

function faultsOf({ revisions }: CaseFile["regimens"][number], path: readonly PropertyKey[]): FieldProblem[] {
  return revisions.flatMap((revision, index) => {
    const at = [...path, "revisions", index];
    if (revision.number !== index + 1)
      return [
        {
          pointer: pointerTo([...at, "number"]),
          detail: `must be ${index + 1}, got ${revision.number}: revisions are numbered from 1 without a gap`,
        },
      ];
    if (contentHashOf(revision) !== revision.contentHash)
      return [
        {
          pointer: pointerTo([...at, "contentHash"]),
          detail: "does not belong to what the revision says: it was changed after it was saved",
        },
      ];
    return [];
  });
}
