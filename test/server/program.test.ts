import { execFile } from "node:child_process";
import { randomUUID } from "node:crypto";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { promisify } from "node:util";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { closeDatabase, openDatabase } from "../../db/open-database.ts";
import { projectFolder } from "../../db/project-folder.ts";
import { RevisionAnswer } from "../../shared/contract/answers.ts";
import type { Revision } from "../../shared/contract/case.ts";
import { type Answer, buildServer, type Program, post, runToItsEnd, startProgram } from "./support/program.ts";
import { caseDraft, draft } from "./support/samples.ts";

const folder = mkdtempSync(join(tmpdir(), "ebbline-program-"));
beforeAll(buildServer, 120_000);
afterAll(() => rmSync(folder, { recursive: true }));
const fileAt = (name: string) => join(folder, name);

/** A regimen to save revisions of; its path for revisions. */
async function makeRegimen(address: string): Promise<string> {
  const { body: kase } = await post(address, "/api/cases", caseDraft);
  const { body: regimen } = await post(address, `/api/cases/${kase["id"]}/regimens`, { label: "A" });
  return `/api/cases/${kase["id"]}/regimens/${regimen["id"]}/revisions`;
}

async function revisionsOf(address: string, path: string): Promise<Revision[]> {
  const { revisions } = (await (await fetch(address + path)).json()) as { revisions: unknown[] };
  return revisions.map((revision) => RevisionAnswer.parse(revision));
}

function expectWhole(file: string): void {
  // Opening checks integrity and references, and refuses a damaged file.
  closeDatabase(openDatabase(file));
}

describe("the program", () => {
  test("makes its database and folder, puts the demo case in, and says one line when it is ready", async () => {
    const file = fileAt("home/first/ebbline.sqlite");
    const { child, address, output, ended } = await startProgram({ EBBLINE_DATABASE: file });
    expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
    const { cases } = (await (await fetch(`${address}/api/cases`)).json()) as {
      cases: { id: string; demo: boolean }[];
    };
    expect(cases.map(({ demo }) => demo)).toEqual([true]);
    await fetch(`${address}/api/ready`).then(({ status }) => expect(status).toBe(200));
    const { regimens } = (await (await fetch(`${address}/api/cases/${cases[0]!.id}`)).json()) as {
      regimens: { latest: Revision }[];
    };
    const sheet = await fetch(`${address}/api/revisions/${regimens[0]!.latest.id}/sheet.pdf`);
    expect([sheet.status, sheet.headers.get("content-type")]).toEqual([200, "application/pdf"]);
    child.kill("SIGTERM");
    expect(await ended).toEqual({ code: 0, signal: null });
    expect(output).toEqual({ stdout: `Ebbline is ready at ${address}\n`, stderr: "" });
    // Closed in order: the log is folded into the file.
    expect(existsSync(`${file}-wal`)).toBe(false);
    expectWhole(file);
  });

  test.for(["SIGTERM", "SIGINT"] as const)(
    "finishes what is running and takes nothing new after %s",
    async (signal) => {
      const file = fileAt(`${signal}.sqlite`);
      const { child, address, ended } = await startProgram({ EBBLINE_DATABASE: file });
      const path = await makeRegimen(address);
      const last = post(address, path, draft);
      await new Promise((resolve) => setTimeout(resolve, 5));
      child.kill(signal);
      expect((await last).status).toBe(201);
      expect(await ended).toEqual({ code: 0, signal: null });
      await expect(fetch(address)).rejects.toThrow();
      const db = openDatabase(file);
      // The demo case has four revisions.
      expect(db.prepare("SELECT COUNT(*) FROM revision").pluck().get()).toBe(5);
      closeDatabase(db);
    },
  );

  test("says which port is taken, and ends", async () => {
    const first = await startProgram({ EBBLINE_DATABASE: fileAt("port.sqlite") });
    const { code, stdout, stderr } = await runToItsEnd({
      EBBLINE_DATABASE: fileAt("port-2.sqlite"),
      PORT: new URL(first.address).port,
    });
    expect([code, stdout]).toEqual([1, ""]);
    expect(stderr).toBe(
      "Ebbline cannot start: the port is taken by another program. Stop that one, or set PORT to another number.\n",
    );
    first.child.kill("SIGTERM");
    await first.ended;
  });

  test.for([
    { environment: { PORT: "x" }, says: 'PORT must be a port number from 0 to 65535, got "x"' },
    { environment: { HOST: "0.0.0.0" }, says: "allowed only behind a proxy that speaks TLS" },
  ])("says what is wrong with $environment, and ends", async ({ environment, says }) => {
    const { code, stdout, stderr } = await runToItsEnd({ EBBLINE_DATABASE: fileAt("unused.sqlite"), ...environment });
    expect([code, stdout]).toEqual([1, ""]);
    expect(stderr).toContain(says);
    expect(existsSync(fileAt("unused.sqlite"))).toBe(false);
  });

  test.for([
    {
      name: "damaged",
      spoil: (bytes: Buffer) => bytes.fill(0x5a, 4_096 * 3, 4_096 * 5),
      says: "the database file is damaged",
    },
    { name: "foreign", spoil: (bytes: Buffer) => bytes.writeUInt32BE(77, 68), says: "a database of another program" },
    {
      name: "newer",
      spoil: (bytes: Buffer) => bytes.writeUInt32BE(99, 60),
      says: "written by a newer release (schema 99, this program knows ",
    },
  ])("refuses a $name file, says so, and leaves it as it was", async ({ name, spoil, says }) => {
    const file = fileAt(`${name}.sqlite`);
    closeDatabase(openDatabase(file));
    // Where the header keeps application_id and user_version: sqlite.org/fileformat.html, 1.3.
    const bytes = readFileSync(file);
    spoil(bytes);
    writeFileSync(file, bytes);
    const { code, stdout, stderr } = await runToItsEnd({ EBBLINE_DATABASE: file });
    expect([code, stdout]).toEqual([1, ""]);
    expect(stderr).toMatch(/^Ebbline cannot use its database file \(EBBLINE_DATABASE\): .*\n$/);
    expect(stderr).toContain(says);
    expect(readFileSync(file).equals(bytes)).toBe(true);
  });

  test("answers others while it computes a year of doses every 2 h", async () => {
    const { child, address, ended } = await startProgram({ EBBLINE_DATABASE: fileAt("busy.sqlite") });
    const path = await makeRegimen(address);
    const order = {
      ...draft.content.schedule.orders[0]!,
      when: { kind: "every", from: draft.content.setting.plan.start, intervalH: 2, end: { kind: "open" } },
    };
    const setting = { ...draft.content.setting, plan: { ...draft.content.setting.plan, horizonH: 8_760 } };
    let done = false;
    const beganAt = performance.now();
    const long = post(address, path, {
      ...draft,
      content: { ...draft.content, setting, schedule: { orders: [order] } },
    }).finally(() => (done = true));
    const waitsMs: number[] = [];
    while (!done) {
      const startedAt = performance.now();
      await fetch(`${address}/api/health`);
      waitsMs.push(performance.now() - startedAt);
    }
    const longMs = performance.now() - beganAt;
    // A plan of a year is unusual and stops, but only after all of it was computed.
    expect((await long).body["type"]).toBe("/problems/unanswered-cautions");
    // Done on the thread that answers, one of these would have waited for nearly all of it. A ratio, since
    // the machine may be busy.
    expect(Math.max(...waitsMs)).toBeLessThan(longMs / 2);
    child.kill("SIGTERM");
    await ended;
  });
});

describe("many processes on one file", () => {
  test("open a new one together, round after round", async () => {
    const open = `import { closeDatabase, openDatabase } from ${JSON.stringify(join(projectFolder(), ".build", "db", "open-database.js"))};
      closeDatabase(openDatabase(process.argv[1]));`;
    const run = promisify(execFile);
    for (let round = 0; round < 4; round++) {
      const file = fileAt(`together-${round}.sqlite`);
      await Promise.all(
        Array.from({ length: 6 }, () => run(process.execPath, ["--input-type=module", "--eval", open, file])),
      );
      expectWhole(file);
    }
  });
});

describe("two processes on one file", () => {
  test("start together on a new file, write by turns and at once, and lose nothing", async () => {
    const file = fileAt("shared.sqlite");
    const both = await Promise.all([
      startProgram({ EBBLINE_DATABASE: file }),
      startProgram({ EBBLINE_DATABASE: file }),
    ]);
    const path = await makeRegimen(both[0].address);
    const acknowledged: string[] = [];
    let refused = 0;
    const writer = async ({ address }: Program, name: string) => {
      for (let saved = 0, seen = 0; saved < 25; ) {
        const { status, body } = await post(address, path, { ...draft, basedOnNumber: seen, preparedBy: name });
        if (status === 201) {
          saved++;
          seen = Number(body["number"]);
          acknowledged.push(`${body["number"]} ${body["contentHash"]}`);
        } else {
          expect([status, body["type"]]).toEqual([409, "/problems/stale"]);
          refused++;
          seen = Number(/newest is (\d+)/.exec(String(body["detail"]))![1]);
        }
      }
    };
    await Promise.all([writer(both[0], "one"), writer(both[1], "two")]);
    const kept = await revisionsOf(both[1].address, path);
    expect(kept.map(({ number }) => number)).toEqual(Array.from({ length: 50 }, (_, index) => 50 - index));
    expect(kept.map(({ number, contentHash }) => `${number} ${contentHash}`).sort()).toEqual(acknowledged.sort());
    expect(refused).toBeGreaterThan(0);
    // The demo case is there once, though both found the file new.
    const { cases } = (await (await fetch(`${both[0].address}/api/cases`)).json()) as { cases: { demo: boolean }[] };
    expect(cases.filter(({ demo }) => demo)).toHaveLength(1);
    for (const { child, ended } of both) {
      child.kill("SIGTERM");
      expect((await ended).code).toBe(0);
    }
    expectWhole(file);
  });
});

describe("kill -9", () => {
  const kills = 20;

  test(`${kills} times in the middle of saving loses no acknowledged revision, and a retry makes no second one`, async () => {
    const file = fileAt("killed.sqlite");
    let program = await startProgram({ EBBLINE_DATABASE: file });
    const path = await makeRegimen(program.address);
    const acknowledged = new Map<number, string>();
    const answer = ({ status, body }: Answer) => {
      expect(status).toBe(201);
      acknowledged.set(Number(body["number"]), String(body["contentHash"]));
    };
    let retried = 0;
    for (let kill = 0; kill < kills; kill++) {
      // Spread over the time of a few saves: each takes 3 to 6 ms here.
      const timer = setTimeout(() => program.child.kill("SIGKILL"), 20 + 7 * kill);
      let open: { body: unknown; key: string } | undefined;
      for (;;) {
        open = { body: { ...draft, basedOnNumber: acknowledged.size }, key: randomUUID() };
        const outcome = await post(program.address, path, open.body, open.key).catch(() => undefined);
        if (outcome === undefined) break;
        answer(outcome);
      }
      clearTimeout(timer);
      expect((await program.ended).signal).toBe("SIGKILL");
      program = await startProgram({ EBBLINE_DATABASE: file });
      // The client cannot know whether the last one was saved: it asks again with the same key, twice.
      answer(await post(program.address, path, open.body, open.key));
      answer(await post(program.address, path, open.body, open.key));
      retried++;
    }
    const kept = await revisionsOf(program.address, path);
    expect(kept.map(({ number }) => number)).toEqual(
      Array.from({ length: acknowledged.size }, (_, index) => acknowledged.size - index),
    );
    for (const { number, contentHash } of kept)
      expect([number, contentHash]).toEqual([number, acknowledged.get(number)]);
    expect(retried).toBe(kills);
    expect(acknowledged.size).toBeGreaterThan(kills);
    program.child.kill("SIGTERM");
    await program.ended;
    expectWhole(file);
  }, 90_000);

  test("before it is ready leaves a file that the next start completes", async () => {
    const file = fileAt("killed-early.sqlite");
    for (const afterMs of [150, 250, 300, 350, 400, 450, 500]) await runToItsEnd({ EBBLINE_DATABASE: file }, afterMs);
    const { child, address, ended } = await startProgram({ EBBLINE_DATABASE: file });
    const { cases } = (await (await fetch(`${address}/api/cases`)).json()) as { cases: unknown[] };
    expect(cases).toHaveLength(1);
    child.kill("SIGTERM");
    await ended;
    expectWhole(file);
  });
});
