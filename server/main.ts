import { randomUUID } from "node:crypto";
import { existsSync } from "node:fs";
import { join } from "node:path";
import { closeDatabase, openDatabase } from "../db/open-database.ts";
import { projectFolder } from "../db/project-folder.ts";
import { sqliteStores } from "../db/stores.ts";
import { createApp } from "./app.ts";
import { insertDemoCase } from "./demo/demo-case.ts";
import { jobRunner } from "./jobs/job-runner.ts";
import { makeLogger } from "./logger.ts";
import { serve } from "./serve.ts";
import { readSettings } from "./settings.ts";
import { silentDescription } from "./silent-description.ts";
import { sayWhyNotStarted } from "./start-failure.ts";

/** A retry comes within minutes, or after a night in a sleeping laptop; after this long it is a new wish. */
const rememberAnswersMs = 30 * 24 * 3_600_000;

try {
  await start();
} catch (error) {
  process.stderr.write(`${sayWhyNotStarted(error)}\n`);
  process.exitCode = 1;
}

async function start(): Promise<void> {
  const settings = readSettings(process.env, process.platform);
  const logger = makeLogger(settings.logLevel);
  const clock = () => new Date().toISOString();
  const db = openDatabase(settings.database);
  const stores = sqliteStores(db);
  const jobs = jobRunner();
  // A thread of its own: no prediction waits for a sheet.
  const calculator = jobRunner();
  await insertDemoCase(stores, jobs.appraise, clock());
  await stores.answers.forgetBefore(new Date(Date.now() - rememberAnswersMs).toISOString());
  const built = join(projectFolder(), ".build", "client");
  const app = createApp({
    stores,
    clock,
    ids: randomUUID,
    logger,
    writeSheet: jobs.writeSheet,
    appraise: jobs.appraise,
    calculate: calculator.calculate,
    settings,
    giveUp: (why) => void stop(why, 1),
    ...(existsSync(join(built, "index.html")) && { clientFolder: built }),
  });
  const close = async () => {
    await Promise.all([jobs.stop(), calculator.stop()]);
    closeDatabase(db);
  };
  const serving = await serve(app, settings).catch(async (error: unknown) => {
    await close();
    throw error;
  });

  let stopping = false;
  const stop = async (why: string, exitCode: number) => {
    if (stopping) return;
    stopping = true;
    logger.info({ why }, "stopping");
    await serving.stop();
    await close();
    process.exitCode = exitCode;
  };
  process.on("SIGTERM", () => void stop("SIGTERM", 0));
  process.on("SIGINT", () => void stop("SIGINT", 0));
  // Left to itself, Node would print the error whole, with whatever somebody typed in its message.
  for (const event of ["unhandledRejection", "uncaughtException"] as const)
    process.on(event, (error: unknown) => {
      logger.fatal({ error: silentDescription(error) }, "an error that nobody handled");
      void stop(event, 1);
    });
  process.stdout.write(`Ebbline is ready at ${serving.address}\n`);
}
