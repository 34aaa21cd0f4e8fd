import type { DatedEliminationChange } from "../../shared/contract/setting.ts";
import type { CasePage } from "../case/case-page.ts";
import { newId } from "../case/new-id.ts";
import { refusedAt } from "../saving/refused.ts";
import { focusOn } from "../shell/focus.ts";
import { draftOfChange, emptyChangeDraft } from "./change-draft.ts";
import { ChangeEditor } from "./change-editor.tsx";
import { sayChange } from "./say-change.ts";
import "./entries.css";

const draftName = (id: string) => `change:${id}`;

/** Elimination that does not stay as it is: failing or recovering kidneys, a dialysis session. */
export function ChangesPart({ page }: { page: CasePage }) {
  const { model, drafts } = page;
  const form = page.form.value;
  const timeZone = page.timeZone.value;
  const open = drafts.all.value;
  const refused = refusedAt(page, "changes-title");
  const changeList = (what: string, edit: (changes: readonly DatedEliminationChange[]) => DatedEliminationChange[]) =>
    model.change(what, (document) => ({
      ...document,
      form: { ...document.form, changes: edit(document.form.changes) },
    }));
  const editor = (key: string, id: string, title: string, known: boolean) => {
    const draft = open[draftName(key)];
    if (draft === undefined) return null;
    const backTo = known ? `change-edit-${id}` : "change-add";
    return (
      <ChangeEditor
        id={id}
        title={title}
        draft={draft}
        timeZone={timeZone}
        onDraft={(fields) => drafts.set(draftName(key), fields)}
        onApply={(change) => {
          drafts.close(draftName(key));
          if (known) changeList("change of elimination", (all) => all.map((each) => (each.id === id ? change : each)));
          else changeList("change of elimination added", (all) => [...all, { ...change, id: newId() }]);
          focusOn(backTo, "changes-title");
        }}
        onCancel={() => {
          drafts.close(draftName(key));
          focusOn(backTo, "changes-title");
        }}
      />
    );
  };
  return (
    <section class="part" aria-labelledby="changes-title">
      <h2 id="changes-title">Changing elimination</h2>
      {refused && <p class="field-problem">{refused}</p>}
      {form.changes.length === 0 && <p class="soft">Elimination stays the same throughout the plan.</p>}
      <ol class="entries">
        {form.changes.map((change, index) => (
          <li key={change.id}>
            <div class="entry">
              <p>
                {sayChange(change, timeZone)}
                {change.origin.note && <span class="soft"> ({change.origin.note})</span>}
              </p>
              <div class="button-row">
                <button
                  type="button"
                  class="button"
                  id={`change-edit-${change.id}`}
                  onClick={() => {
                    drafts.open(draftName(change.id), draftOfChange(change, timeZone));
                    focusOn(`change-${change.id}-value`);
                  }}
                >
                  Edit<span class="unseen"> change {index + 1}</span>
                </button>
                <button
                  type="button"
                  class="button"
                  onClick={() => {
                    drafts.close(draftName(change.id));
                    changeList("change of elimination deleted", (all) => all.filter((each) => each.id !== change.id));
                    focusOn("change-add", "changes-title");
                  }}
                >
                  Delete<span class="unseen"> change {index + 1}</span>
                </button>
              </div>
            </div>
            {editor(change.id, change.id, `Change ${index + 1}`, true)}
          </li>
        ))}
      </ol>
      {editor("new", "new", "New change of elimination", false)}
      {open[draftName("new")] === undefined && (
        <button
          type="button"
          class="button"
          id="change-add"
          onClick={() => {
            drafts.open(draftName("new"), emptyChangeDraft);
            focusOn("change-new-value");
          }}
        >
          Add a change of elimination
        </button>
      )}
    </section>
  );
}
