import type { Browser } from "playwright-core";
import { afterAll, beforeAll } from "vitest";
import { openBrowser } from "./browser.ts";
import { type RunningServer, startServer } from "./running-server.ts";

/** The built program on a database of its own, and a browser to use it with. */
export interface RunningProgram {
  readonly server: RunningServer;
  readonly browser: Browser;
}

/** Starts both before the tests of a file and ends them after; to be asked for within a test. */
export function runningProgram(): () => RunningProgram {
  let running: RunningProgram | undefined;
  beforeAll(async () => {
    const [server, browser] = await Promise.all([startServer(), openBrowser()]);
    running = { server, browser };
  });
  afterAll(async () => {
    await running?.browser.close();
    await running?.server.stop();
  });
  return () => {
    if (running === undefined) throw new Error("the program is not running");
    return running;
  };
}
