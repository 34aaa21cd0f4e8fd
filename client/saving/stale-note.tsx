import type { RegimenContent } from "../../shared/contract/case.ts";
import { type CaseDocument, contentOf, withAlternative } from "../case/case-document.ts";
import type { CasePage } from "../case/case-page.ts";
import { documentOfCase, emptySchedule } from "../case/document-of-case.ts";
import { sayInstant } from "../controls/moment-field.tsx";
import { DifferencesTable } from "./differences-table.tsx";
import type { Stale } from "./save-details.ts";
import "../shell/failure-note.css";

interface StaleNoteProps {
  readonly page: CasePage;
  readonly stale: Stale;
  readonly onSettled: (choice: "save-on-top" | "loaded") => void;
}

/** Somebody saved in between: shows what differs, and lets the person choose with the typed work kept. */
export function StaleNote({ page, stale, onSettled }: StaleNoteProps) {
  const { newest, what } = stale;
  const latest = newest.regimens.find(({ id }) => id === page.selected.value?.regimenId)?.latest;
  const theirs = what === "details" ? detailsContent(documentOfCase(newest)) : latest?.content;
  const mine = what === "details" ? detailsContent(page.settled.value) : page.selectedContent.value;
  const agree = () => {
    page.stored.value = newest;
    if (what === "details") page.baseVersion.value = newest.case.version;
    else if (latest !== undefined)
      page.model.rewrite((document) => basedOn(document, page.selected.peek()?.key, latest.number));
  };
  return (
    <div class="failure" role="alert">
      <h3>Somebody saved in between; nothing of yours is lost</h3>
      <p>
        {what === "details"
          ? `The case's details were changed at ${sayInstant(newest.case.changedAt, newest.case.timeZone)}.`
          : latest &&
            `Revision ${latest.number} was saved at ${sayInstant(latest.createdAt, newest.case.timeZone)} by ${latest.preparedBy}: ${latest.reason}`}
      </p>
      {theirs !== undefined && mine !== undefined ? (
        <DifferencesTable before={theirs} after={mine} names={names} texts={notesOf(page, stale)} />
      ) : (
        <p>
          Kinetics and plan cannot be set side by side, because one of the two is not complete. Notes saved in between:{" "}
          {newest.case.notes || "none"}
        </p>
      )}
      <div class="button-row">
        <button
          type="button"
          class="button"
          onClick={() => {
            agree();
            onSettled("save-on-top");
          }}
        >
          Save yours on top of it
        </button>
        <button
          type="button"
          class="button"
          onClick={() => {
            agree();
            load(page, stale);
            onSettled("loaded");
          }}
        >
          Load the newer one instead (Undo brings yours back)
        </button>
      </div>
    </div>
  );
}

const names = { before: "Saved in between", after: "Yours on this page" };

function notesOf(page: CasePage, { newest, what }: Stale) {
  if (what === "revision") return [];
  return [{ path: "notes", label: "Notes of the case", before: newest.case.notes, after: page.settled.value.notes }];
}

function load(page: CasePage, { newest, what }: Stale): void {
  const opened = documentOfCase(newest);
  if (what === "details") {
    const { label, timeZone, notes, form } = opened;
    page.model.change("newer details loaded", (document) => ({ ...document, label, timeZone, notes, form }));
    return;
  }
  const key = page.selected.peek()?.key ?? "";
  const theirs = opened.alternatives.find(({ regimenId }) => regimenId === page.selected.peek()?.regimenId);
  if (theirs === undefined) return;
  const { label, schedule, cautionReasons } = theirs;
  page.model.change("newer revision loaded", (document) =>
    withAlternative(document, key, (each) => ({ ...each, label, schedule, cautionReasons })),
  );
}

function basedOn(document: CaseDocument, key: string | undefined, savedNumber: number): CaseDocument {
  return withAlternative(document, key ?? "", (each) => ({ ...each, savedNumber }));
}

/** Details alone, in the form that two contents are compared in. */
function detailsContent(document: CaseDocument): RegimenContent | undefined {
  return contentOf(document, { key: "", label: "case", schedule: emptySchedule, savedNumber: 0, cautionReasons: [] });
}
