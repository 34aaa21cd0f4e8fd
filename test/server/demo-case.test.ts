import request from "supertest";
import { describe, expect, test } from "vitest";
import { insertDemoCase } from "../../server/demo/demo-case.ts";
import { WholeCase } from "../../shared/contract/answers.ts";
import { givenDoses } from "../../shared/schedule/doses-given.ts";
import { makeApp, now } from "./support/make-app.ts";

const demo = async (app: Parameters<typeof request>[0]) => {
  const { body: list } = await request(app).get("/api/cases");
  const { body } = await request(app).get(`/api/cases/${list.cases[0].id}`).expect(200);
  return WholeCase.parse(body);
};

describe("the demo case", () => {
  test("says that it is invented and has what there is to see", async () => {
    const { app, needs } = makeApp();
    await insertDemoCase(needs.stores, needs.appraise, now);
    const { case: kase, regimens } = await demo(app);
    expect(kase.demo).toBe(true);
    expect(`${kase.label} ${kase.notes}`).toMatch(/invented.*invented/is);
    expect(regimens.map(({ latestRevisionNumber }) => latestRevisionNumber)).toEqual([2, 1, 1]);
    const [everyEightHours] = regimens;
    const late = givenDoses(everyEightHours!.latest!.content).filter(({ status }) => status === "changed");
    expect(late.map(({ atH, plannedAtH }) => atH - plannedAtH!)).toEqual([2.5]);
    expect(kase.setting!.eliminationChanges.map(({ kind }) => kind)).toEqual(["added-clearance"]);
    for (const { latest } of regimens) expect(latest!.secondOpinion.relative).toBeLessThan(1e-9);
  });

  test("is the same everywhere and is put in once, also when somebody archived it", async () => {
    const { app, needs } = makeApp();
    await insertDemoCase(needs.stores, needs.appraise, now);
    const first = await demo(app);
    const other = makeApp();
    await insertDemoCase(other.needs.stores, other.needs.appraise, now);
    expect(await demo(other.app)).toEqual(first);
    const { id } = first.case;
    await request(app)
      .patch(`/api/cases/${id}`)
      .set("Idempotency-Key", crypto.randomUUID())
      .send({ version: 1, archived: true })
      .expect(200);
    await insertDemoCase(needs.stores, needs.appraise, now);
    expect((await request(app).get("/api/cases")).body.cases).toEqual([]);
  });

  test("is completed by the next start when the first one was cut short at any step", async () => {
    const whole = makeApp();
    await insertDemoCase(whole.needs.stores, whole.needs.appraise, now);
    for (let cut = 1; cut <= 4; cut++) {
      const { app, needs } = makeApp();
      let left = cut;
      const failing = async (content: Parameters<typeof needs.appraise>[0]) => {
        if (--left === 0) throw new Error("cut short");
        return needs.appraise(content);
      };
      await expect(insertDemoCase(needs.stores, failing, now)).rejects.toThrow("cut short");
      await insertDemoCase(needs.stores, needs.appraise, now);
      expect(await demo(app)).toEqual(await demo(whole.app));
    }
  });
});
