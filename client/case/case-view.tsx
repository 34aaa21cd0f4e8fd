import { effect, useComputed, useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import { AlternativesPart } from "../alternatives/alternatives-part.tsx";
import { DosesPart } from "../doses/doses-part.tsx";
import { type Keeping, keepWhileOpen } from "../keeping/keep-while-open.ts";
import { OrdersPart } from "../orders/orders-part.tsx";
import { ArithmeticSection } from "../reading/arithmetic-section.tsx";
import { CurveSection } from "../reading/curve-section.tsx";
import { FiguresSection } from "../reading/figures-section.tsx";
import { RemainsSection } from "../reading/remains-section.tsx";
import { WaitSection } from "../reading/wait-section.tsx";
import { SavePart } from "../saving/save-part.tsx";
import { CaseDetails } from "../setting/case-details.tsx";
import { ChangesPart } from "../setting/changes-part.tsx";
import { SettingPart } from "../setting/setting-part.tsx";
import { announce } from "../shell/announce.ts";
import { PageFrame } from "../shell/page-frame.tsx";
import { letterOf } from "./case-document.ts";
import type { CasePage } from "./case-page.ts";
import { CaseTools } from "./case-tools.tsx";
import { sayOtherCautions } from "./other-cautions.ts";
import { useUndoKeys } from "./undo-keys.ts";
import "./case-view.css";

/** What the server did not accept is told until something is changed. */
function clearRefusals({ model, drafts, refused }: CasePage): () => void {
  return effect(() => {
    void [model.document.value, drafts.all.value];
    if (refused.peek().length > 0) refused.value = [];
  });
}

/** One case, read from top to bottom as the question is asked. */
export function CaseView({ page }: { page: CasePage }) {
  const { model } = page;
  const keeping = useSignal<Keeping>("kept");
  useEffect(() => keepWhileOpen(page, keeping), [page]);
  useEffect(() => model.lastChange.subscribe(announce), [page]);
  useEffect(() => clearRefusals(page), [page]);
  useUndoKeys(model);
  useEffect(() => page.close, [page]);
  const others = useComputed(() => sayOtherCautions(page.settled.value, page.selected.value?.key));
  const settled = page.settled.value;
  const selected = page.selected.value;
  const { label } = settled;
  useEffect(() => {
    document.title = `${label} - Ebbline`;
  }, [label]);
  return (
    <PageFrame
      cautions={page.judged.value.cautions}
      about={selected && `Alternative ${letterOf(settled, selected.key)}`}
      elsewhere={others.value}
      tools={<CaseTools page={page} keeping={keeping.value} />}
    >
      <CaseDetails page={page} />
      <SettingPart page={page} />
      <ChangesPart page={page} />
      <AlternativesPart page={page} />
      <OrdersPart page={page} />
      <DosesPart page={page} />
      <CurveSection model={model} />
      <RemainsSection model={model} />
      <FiguresSection model={model} />
      <WaitSection model={model} />
      <ArithmeticSection model={model} />
      <SavePart page={page} />
    </PageFrame>
  );
}
