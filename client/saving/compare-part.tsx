import { useComputed, useSignal } from "@preact/signals";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { contentOf, letterOf } from "../case/case-document.ts";
import { type CasePage, savedStateOf } from "../case/case-page.ts";
import { SelectField } from "../controls/select-field.tsx";
import type { Failure } from "../http/answer.ts";
import { CurveComparison } from "../reading/curve-comparison.tsx";
import { FailureNote } from "../shell/failure-note.tsx";
import { DifferencesTable } from "./differences-table.tsx";

interface Side {
  readonly value: string;
  readonly regimenId?: string;
  readonly label: string;
  readonly content: RegimenContent;
}

/** Any two revisions of the case, or what is on the page, set side by side: field by field and as curves. */
export function ComparePart({ page }: { page: CasePage }) {
  const saved = useSignal<readonly Side[] | undefined>(undefined);
  const failure = useSignal<Failure | undefined>(undefined);
  const chosen = useSignal({ before: "", after: "" });
  const gather = async () => {
    const gathered = await savedSides(page);
    failure.value = "failure" in gathered ? gathered.failure : undefined;
    if ("failure" in gathered) return;
    saved.value = gathered.sides;
    chosen.value = opening(page, gathered.sides);
  };
  const onPage = useComputed(() => pageSides(page)).value;
  if (saved.value === undefined)
    return (
      <div class="compare">
        <button type="button" class="button" onClick={gather}>
          Compare any two revisions
        </button>
        {failure.value && <FailureNote failure={failure.value} />}
      </div>
    );
  const sides = [...saved.value, ...onPage];
  const find = (value: string) => sides.find((side) => side.value === value);
  const before = find(chosen.value.before);
  const after = find(chosen.value.after);
  return (
    <section class="compare" aria-labelledby="compare-title">
      <h3 id="compare-title">Two revisions compared</h3>
      <div class="fields">
        <SelectField
          id="compare-before"
          label="From"
          value={chosen.value.before}
          choices={sides}
          onChoice={(value) => {
            chosen.value = { ...chosen.value, before: value };
          }}
        />
        <SelectField
          id="compare-after"
          label="To"
          value={chosen.value.after}
          choices={sides}
          onChoice={(value) => {
            chosen.value = { ...chosen.value, after: value };
          }}
        />
      </div>
      <div class="button-row save-row">
        <button type="button" class="button" onClick={gather}>
          Look for newer revisions
        </button>
      </div>
      {before && after && (
        <>
          <DifferencesTable
            before={before.content}
            after={after.content}
            names={{ before: before.label, after: after.label }}
          />
          <CurveComparison before={before.content} after={after.content} />
        </>
      )}
    </section>
  );
}

/** What one most likely wants to see: what was changed since the newest revision, else what that one changed. */
function opening(page: CasePage, saved: readonly Side[]): { readonly before: string; readonly after: string } {
  const selected = page.selected.peek();
  const [newest, before] = saved.filter(({ regimenId }) => regimenId === selected?.regimenId);
  const changed = selected !== undefined && savedStateOf(page, selected) === "changed";
  if (changed) return { before: newest?.value ?? "", after: `page ${selected.key}` };
  return { before: (before ?? newest)?.value ?? "", after: newest?.value ?? "" };
}

type Gathered = { readonly sides: readonly Side[] } | { readonly failure: Failure };

async function savedSides(page: CasePage): Promise<Gathered> {
  const { listRevisions } = await import("../http/cases-api.ts");
  const { case: stored, regimens } = page.stored.peek();
  const answers = await Promise.all(
    regimens
      .filter(({ latestRevisionNumber }) => latestRevisionNumber > 0)
      .map(({ id }) => listRevisions(stored.id, id)),
  );
  const sides: Side[] = [];
  for (const answer of answers) {
    if (!answer.ok) return { failure: answer.failure };
    const newestFirst = [...answer.value.revisions].sort((one, other) => other.number - one.number);
    for (const { id, number, content, regimenId } of newestFirst)
      sides.push({ value: id, regimenId, label: `${content.regimenLabel}, revision ${number}`, content });
  }
  return { sides };
}

function pageSides(page: CasePage): Side[] {
  const document = page.settled.value;
  return document.alternatives.flatMap((alternative) => {
    const { key, label } = alternative;
    const content = contentOf(document, alternative);
    return content === undefined
      ? []
      : [{ value: `page ${key}`, label: `${letterOf(document, key)} ${label}, as on this page`, content }];
  });
}
