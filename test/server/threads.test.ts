import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { afterAll, beforeAll, describe, expect, onTestFinished, test } from "vitest";
import { projectFolder } from "../../db/project-folder.ts";
import type { jobRunner as JobRunner } from "../../server/jobs/job-runner.ts";
import { answerQuestion } from "../../server/predictions/answer-question.ts";
import { appraise } from "../../server/revisions/appraise.ts";
import { RegimenContent, type Revision } from "../../shared/contract/case.ts";
import { buildServer, post, startProgram } from "./support/program.ts";
import { draft } from "./support/samples.ts";

const folder = mkdtempSync(join(tmpdir(), "ebbline-threads-"));
beforeAll(buildServer, 120_000);
afterAll(() => rmSync(folder, { recursive: true }));
const fileAt = (name: string) => join(folder, name);

/** As built: Node starts a thread from a .js file only. */
const runner = async (mostMs?: number) => {
  const built = (await import(
    pathToFileURL(join(projectFolder(), ".build", "server", "jobs", "job-runner.js")).href
  )) as {
    jobRunner: typeof JobRunner;
  };
  const jobs = built.jobRunner(mostMs);
  onTestFinished(() => jobs.stop());
  return jobs;
};

function errorOf(call: () => unknown): unknown {
  try {
    return call();
  } catch (error) {
    return error;
  }
}

describe("the thread for long work", () => {
  const content = RegimenContent.parse(draft.content);

  test("appraises as this thread would", async () => {
    const jobs = await runner();
    expect(await jobs.appraise(content)).toEqual(appraise(content));
  });

  test("fails one job without a word of what was typed, and does the next", async () => {
    const jobs = await runner();
    const broken: Revision = JSON.parse('{ "number": 1, "content": { "caseLabel": "SECRET-LABEL" } }');
    const error = await jobs.writeSheet(broken, { paper: "A4" }).catch((reason: unknown) => reason);
    expect(JSON.stringify([error, String(error)])).not.toContain("SECRET-LABEL");
    expect(error).toMatchObject({ name: "DescribedError", description: { name: expect.stringMatching(/Error$/) } });
    expect(await jobs.appraise(content)).toMatchObject({ ok: true });
  });

  test("gives up a job that takes too long, and starts anew for the next", async () => {
    const jobs = await runner(1_500);
    const year = { ...content.setting.plan, horizonH: 17_568 };
    const [order] = content.schedule.orders;
    const when = { kind: "every", from: year.start, intervalH: 2, end: { kind: "open" } } as const;
    const long = {
      ...content,
      setting: { ...content.setting, plan: year },
      schedule: { ...content.schedule, orders: [{ ...order!, when }] },
    };
    const outcomes = await Promise.allSettled(Array.from({ length: 40 }, () => jobs.appraise(long)));
    expect(outcomes.filter(({ status }) => status === "rejected")[0]).toMatchObject({ reason: { code: "too-long" } });
    await expect
      .poll(() => jobs.appraise(content).catch(() => undefined), { timeout: 15_000 })
      .toMatchObject({ ok: true });
  });
});

describe("the thread that calculates", () => {
  const body = {
    parameters: { volumeL: 40, clearanceLPerH: 5 },
    doses: [{ kind: "bolus", atH: 0, amountMg: 500 }],
    horizonH: 24,
    sampleEveryH: 0.5,
  };
  const text = (bytes: Uint8Array) => Buffer.from(bytes).toString();

  test("answers many questions at once, each with its own answer, as this thread would", async () => {
    const { calculate } = await runner();
    const questions = Array.from({ length: 40 }, (_, index) => ({
      kind: "prediction" as const,
      body: { ...body, horizonH: 24 + index },
    }));
    const answers = await Promise.all(questions.map(calculate));
    for (const [index, question] of questions.entries())
      expect(text(answers[index]!)).toBe(text(answerQuestion(question)));
  });

  test("refuses a bad question with the error that it deserves, and answers the others", async () => {
    const { calculate } = await runner();
    const bad = { kind: "prediction" as const, body: { ...body, parameters: { volumeL: 0, clearanceLPerH: 5 } } };
    const [refused, answered] = await Promise.allSettled([calculate(bad), calculate({ kind: "prediction", body })]);
    expect(refused).toMatchObject({ status: "rejected" });
    const here = errorOf(() => answerQuestion(bad));
    if (refused?.status === "rejected") expect(JSON.stringify(refused.reason)).toBe(JSON.stringify(here));
    expect(answered?.status).toBe("fulfilled");
  });

  test("the program's own answer is a problem document that names the field", async () => {
    const { child, address, ended } = await startProgram({ EBBLINE_DATABASE: fileAt("calculating.sqlite") });
    const good = await post(address, "/api/predictions", body);
    expect(good.body).toMatchObject({ cautions: [{ code: "standing" }] });
    const refused = await post(address, "/api/predictions", { ...body, horizonH: -1 });
    expect(refused).toMatchObject({ status: 422, body: { errors: [{ pointer: "#/horizonH" }] } });
    const contradicts = await post(address, "/api/predictions", {
      ...body,
      doses: [{ kind: "absorbed", atH: 0, amountMg: 1 }],
    });
    expect(contradicts.status).toBe(422);
    child.kill("SIGTERM");
    await ended;
  });
});
