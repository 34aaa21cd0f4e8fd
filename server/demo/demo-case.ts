import type { Intention } from "../../db/once.ts";
import { sealOf } from "../../db/seal.ts";
import type { Stores } from "../../db/stores.ts";
import { Case, RegimenContent, RegimenId, RevisionId } from "../../shared/contract/case.ts";
import type { Instant } from "../../shared/contract/schedule.ts";
import { type Appraise, judgeContent } from "../revisions/judge-content.ts";
import { demoCase, demoContent, demoRevisions } from "./demo-content.ts";

/**
 * Puts the demo case into a database that has never had it: on first start, and never again, also when
 * somebody archives it. Ids and idempotency keys are fixed, so a start that was cut short in the middle is
 * completed by the next one, and of two processes that start together neither puts anything in twice.
 *
 * @param at now, for the record of when it was put in; what it says is dated as it was invented
 */
export async function insertDemoCase(stores: Stores, appraise: Appraise, at: Instant): Promise<void> {
  if (await stores.milestones.isReached("demo-case")) return;
  const [{ createdAt }] = demoRevisions as [(typeof demoRevisions)[number]];
  const made = Case.parse({
    ...demoCase,
    id: fixedId(1),
    version: 1,
    archived: false,
    demo: true,
    createdAt,
    changedAt: createdAt,
  });
  await stores.cases.add(intentionFor(made.id, made, at), made);
  const labels = [...new Set(demoRevisions.map(({ label }) => label))];
  for (const [position, label] of labels.entries()) {
    const regimen = { id: RegimenId.parse(fixedId(10 + position)), caseId: made.id, label, retired: false, createdAt };
    await stores.regimens.add(intentionFor(regimen.id, regimen, at), regimen);
  }
  for (const [index, { label, schedule, ...rest }] of demoRevisions.entries()) {
    const content = RegimenContent.parse(demoContent(label, schedule));
    const secondOpinion = await judgeContent(content, "#/demo", appraise);
    const regimenId = RegimenId.parse(fixedId(10 + labels.indexOf(label)));
    const before = demoRevisions.slice(0, index).filter((revision) => revision.label === label).length;
    const revision = {
      ...rest,
      id: RevisionId.parse(fixedId(20 + index)),
      caseId: made.id,
      regimenId,
      preparedBy: "Ebbline (invented)",
      content,
      secondOpinion,
    };
    await stores.revisions.add(intentionFor(revision.id, content, at), before, revision);
  }
  await stores.milestones.reach("demo-case", at);
}

/** UUIDs of our own that no random one will meet: version 8 is for an application's own use (RFC 9562, 5.8). */
function fixedId(number: number): string {
  return `ebb11e00-0000-8000-8000-${String(number).padStart(12, "0")}`;
}

function intentionFor(id: string, value: unknown, at: Instant): Intention {
  return { key: id, fingerprint: sealOf(value), at };
}
