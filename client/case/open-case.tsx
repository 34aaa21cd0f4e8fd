import { useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { standingCaution } from "../../shared/cautions/standing.ts";
import type { WholeCase } from "../../shared/contract/answers.ts";
import type { Failure } from "../http/answer.ts";
import { dropKept, keptName, readKept } from "../keeping/kept-text.ts";
import type { KeptWork } from "../keeping/unsaved-form.ts";
import { UnsavedOffer } from "../keeping/unsaved-offer.tsx";
import { FailureNote } from "../shell/failure-note.tsx";
import { focusOn } from "../shell/focus.ts";
import { PageFrame } from "../shell/page-frame.tsx";
import { type CasePage, createCasePage, hasUnsaved } from "./case-page.ts";
import { CaseView } from "./case-view.tsx";

type Opening =
  | { readonly step: "loading" }
  | { readonly step: "failed"; readonly failure: Failure }
  | { readonly step: "offer"; readonly whole: WholeCase; readonly text: string; readonly kept: KeptWork | undefined }
  | { readonly step: "open"; readonly page: CasePage };

/** Loads a case, asks about unsaved work of an earlier visit, then shows the case. */
export function OpenCase({ id }: { id: string }) {
  const opening = useSignal<Opening>({ step: "loading" });
  const load = async () => {
    opening.value = { step: "loading" };
    opening.value = await openedCase(id);
  };
  useEffect(() => void load(), [id]);
  const now = opening.value;
  if (now.step === "open") return <CaseView page={now.page} />;
  const open = (page: CasePage) => {
    opening.value = { step: "open", page };
    // The button that was pressed is gone.
    focusOn("main");
  };
  return (
    <PageFrame cautions={[standingCaution]}>
      {now.step === "loading" && <h1 class="loading">Loading the case …</h1>}
      {now.step === "failed" && (
        <>
          <h1>The case could not be opened</h1>
          <FailureNote failure={now.failure} onRetry={load} />
        </>
      )}
      {now.step === "offer" && (
        <UnsavedOffer
          whole={now.whole}
          text={now.text}
          kept={now.kept}
          onTakeUp={(kept) => open(createCasePage(now.whole, kept))}
          onDiscard={() => {
            dropKept(keptName(id));
            open(createCasePage(now.whole));
          }}
        />
      )}
    </PageFrame>
  );
}

/** Kept work that says what the server has by now is no news. */
function isNews(whole: WholeCase, kept: KeptWork): boolean {
  const page = createCasePage(whole, kept);
  page.close();
  return hasUnsaved(page);
}

/** The schemas come with the first request, so that the page itself is there sooner. */
async function openedCase(id: string): Promise<Opening> {
  const [{ loadCase }, { readUnsaved }] = await Promise.all([
    import("../http/cases-api.ts"),
    import("../keeping/unsaved-form.ts"),
  ]);
  const answer = await loadCase(id);
  if (!answer.ok) return { step: "failed", failure: answer.failure };
  const whole = answer.value;
  const text = readKept(keptName(id));
  if (text === undefined) return { step: "open", page: createCasePage(whole) };
  const kept = readUnsaved(text);
  if (kept !== undefined && !isNews(whole, kept)) return { step: "open", page: createCasePage(whole) };
  return { step: "offer", whole, text, kept };
}
