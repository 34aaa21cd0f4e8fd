import { afterEach, describe, expect, test, vi } from "vitest";
import { withNewAlternative } from "../../../client/alternatives/alternative-edits.ts";
import { withAlternative, withSchedule } from "../../../client/case/case-document.ts";
import { createCasePage, hasUnsaved, savedStateOf } from "../../../client/case/case-page.ts";
import { saveAlternative } from "../../../client/saving/save-alternative.ts";
import { standingCaution } from "../../../shared/cautions/standing.ts";
import { inventedContent } from "../../invented-content.ts";
import { caseId, inventedCase, inventedRevision, inventedWholeCase, regimenId } from "../case/invented-case.ts";
import { problem, stubNetwork } from "./stub-server.ts";

const words = { reason: "first plan", preparedBy: "A Tester" };
const revisions = `/api/cases/${caseId}/regimens/${regimenId}/revisions`;

/** The page with the dose halved: 250 mg, invented. */
function halved() {
  const page = createCasePage(inventedWholeCase());
  page.model.change("amount", (document) =>
    withSchedule(document, regimenId, (schedule) => ({
      ...schedule,
      orders: schedule.orders.map((order) => ({ ...order, give: { kind: "bolus" as const, amountMg: 250 } })),
    })),
  );
  return page;
}

function halvedContent() {
  const content = inventedContent();
  const orders = content.schedule.orders.map((order) => ({
    ...order,
    give: { kind: "bolus" as const, amountMg: 250 },
  }));
  return { ...content, schedule: { ...content.schedule, orders } };
}

afterEach(() => vi.unstubAllGlobals());

describe("saveAlternative", () => {
  test("an untouched page has nothing unsaved", () => {
    const page = createCasePage(inventedWholeCase());
    expect(hasUnsaved(page)).toBe(false);
    expect(savedStateOf(page, page.selected.value!)).toBe("saved");
  });

  test("saves a revision on the newest one, and then all is saved, in every undo step too", async () => {
    const page = halved();
    expect(savedStateOf(page, page.selected.value!)).toBe("changed");
    const asked = stubNetwork([{ status: 201, body: inventedRevision(2, halvedContent()) }]);
    const outcome = await saveAlternative(page, regimenId, words);
    expect(outcome.kind).toBe("saved");
    expect(asked).toEqual([
      {
        method: "POST",
        path: revisions,
        key: expect.stringMatching(/^[0-9a-f-]{36}$/),
        body: { basedOnNumber: 1, ...words, content: halvedContent() },
      },
    ]);
    expect(hasUnsaved(page)).toBe(false);
    page.model.undo();
    expect(page.model.document.value.alternatives[0]?.savedNumber).toBe(2);
    expect(hasUnsaved(page)).toBe(true);
    page.model.redo();
    expect(hasUnsaved(page)).toBe(false);
  });

  test("after a lost answer the next try carries the same key; after a known one, a new key", async () => {
    const page = halved();
    const revision = { status: 201, body: inventedRevision(2, halvedContent()) };
    const asked = stubNetwork(["no answer", revision, problem(409), { status: 200, body: inventedWholeCase() }]);
    expect(await saveAlternative(page, regimenId, words)).toMatchObject({
      kind: "failed",
      failure: { kind: "unreachable" },
    });
    expect(hasUnsaved(page)).toBe(true);
    await saveAlternative(page, regimenId, words);
    expect(asked[1]?.key).toBe(asked[0]?.key);
    await saveAlternative(page, regimenId, words);
    expect(asked[2]?.key).not.toBe(asked[1]?.key);
  });

  test("a stale save brings what was saved in between and keeps what was typed", async () => {
    const page = halved();
    const typed = page.model.document.value;
    const newest = inventedWholeCase();
    const [regimen] = newest.regimens;
    stubNetwork([
      problem(409),
      {
        status: 200,
        body: { ...newest, regimens: [{ ...regimen, latestRevisionNumber: 2, latest: inventedRevision(2) }] },
      },
    ]);
    const outcome = await saveAlternative(page, regimenId, words);
    expect(outcome).toMatchObject({ kind: "stale", what: "revision" });
    expect(page.model.document.value).toBe(typed);
  });

  test("what the server does not accept stands by its pointer", async () => {
    const page = halved();
    const errors = [{ pointer: "#/content/schedule/orders/0/give/amountMg", detail: "must be less" }];
    stubNetwork([problem(422, errors)]);
    expect((await saveAlternative(page, regimenId, words)).kind).toBe("failed");
    expect(page.refused.value).toEqual(errors);
  });

  test("changed details are saved first, from the version that was seen", async () => {
    const page = createCasePage(inventedWholeCase());
    page.model.change("notes", (document) => ({ ...document, notes: "new" }));
    const asked = stubNetwork([
      { status: 200, body: { ...inventedCase({ version: 2, notes: "new" }), cautions: [standingCaution] } },
      { status: 201, body: inventedRevision(2) },
    ]);
    await saveAlternative(page, regimenId, words);
    expect(asked.map(({ method, path }) => `${method} ${path}`)).toEqual([
      `PATCH /api/cases/${caseId}`,
      `POST ${revisions}`,
    ]);
    expect(asked[0]?.body).toMatchObject({ version: 1, notes: "new" });
    expect(page.baseVersion.value).toBe(2);
    expect(hasUnsaved(page)).toBe(false);
  });

  test("a new alternative is made known once, even when its revision is refused at first", async () => {
    const page = createCasePage(inventedWholeCase());
    page.model.change("added", (document) => withNewAlternative(document, "fresh"));
    const made = {
      ...inventedWholeCase().regimens[0],
      id: "00000000-0000-4000-8000-000000000003",
      label: "Another plan",
      latestRevisionNumber: 0,
    };
    const { latest: _, ...regimen } = made;
    const asked = stubNetwork([
      { status: 201, body: regimen },
      problem(422),
      { status: 201, body: { ...inventedRevision(1), regimenId: made.id } },
    ]);
    await saveAlternative(page, "fresh", words);
    await saveAlternative(page, "fresh", words);
    expect(asked.map(({ path }) => path.split("/").slice(4).join("/"))).toEqual([
      "regimens",
      `regimens/${made.id}/revisions`,
      `regimens/${made.id}/revisions`,
    ]);
  });

  test("a reason whose caution is gone is not sent", async () => {
    const page = halved();
    const reason = { code: "unusual", about: "/x", text: "of another value", reason: "meant so" };
    page.model.change("reason", (document) =>
      withAlternative(document, regimenId, (each) => ({ ...each, cautionReasons: [reason] })),
    );
    const asked = stubNetwork([{ status: 201, body: inventedRevision(2, halvedContent()) }]);
    await saveAlternative(page, regimenId, words);
    expect(asked[0]?.body).toMatchObject({ content: { cautionReasons: [] } });
  });
});
