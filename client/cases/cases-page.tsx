import { useComputed, useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { standingCaution } from "../../shared/cautions/standing.ts";
import type { Case } from "../../shared/contract/case.ts";
import { ChoiceField } from "../controls/choice-field.tsx";
import { TextField } from "../controls/text-field.tsx";
import type { Failure } from "../http/answer.ts";
import { announce } from "../shell/announce.ts";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { PageFrame } from "../shell/page-frame.tsx";
import { CaseList } from "./case-list.tsx";
import { NewCaseForm } from "./new-case-form.tsx";
import { UploadCase } from "./upload-case.tsx";
import "./cases-page.css";

type Shelf = "none" | "only";

/** Every case: find one, make one, take one in from a file, archive one and bring it back. */
export function CasesPage() {
  const shelf = useSignal<Shelf>("none");
  const find = useSignal("");
  const cases = useSignal<readonly Case[] | undefined>(undefined);
  const failure = useSignal<Failure | undefined>(undefined);
  const found = useComputed(() => cases.value?.filter((each) => matches(each, find.value)));
  const load = async () => {
    const asked = shelf.peek();
    const { listCases } = await import("../http/cases-api.ts");
    const answer = await listCases(asked);
    if (asked !== shelf.peek()) return;
    failure.value = answer.ok ? undefined : answer.failure;
    if (answer.ok) cases.value = answer.value.cases;
  };
  useEffect(() => {
    document.title = "Cases - Ebbline";
    void load();
  }, []);
  const move = async ({ id, version, label, archived }: Case) => {
    const { changeCase } = await import("../http/cases-api.ts");
    const answer = await changeCase(id, { version, archived: !archived });
    failure.value = answer.ok ? undefined : answer.failure;
    if (answer.ok) announce(archived ? `${label} is brought back` : `${label} is archived`);
    await load();
    focusOn("cases-title");
  };
  return (
    <PageFrame cautions={[standingCaution]}>
      <h1 id="cases-title">Cases</h1>
      <div class="cases-find">
        <TextField
          id="find"
          label="Find by label or notes"
          text={find.value}
          onText={(text) => {
            find.value = text;
          }}
        />
        <ChoiceField
          id="shelf"
          legend="Which cases"
          value={shelf.value}
          choices={[
            { value: "none", label: "in use" },
            { value: "only", label: "archived" },
          ]}
          onChoice={(choice) => {
            shelf.value = choice;
            cases.value = undefined;
            void load();
          }}
        />
      </div>
      {failure.value && <FailureNote failure={failure.value} onRetry={load} />}
      <CaseList cases={found.value} sought={find.value} onMove={move} />
      <NewCaseForm />
      <UploadCase />
    </PageFrame>
  );
}

/** Every word must be somewhere in the label or the notes. */
function matches({ label, notes }: Case, sought: string): boolean {
  const text = `${label} ${notes}`.toLowerCase();
  return sought
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word));
}
