#!/usr/bin/env node
import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { ensureInstalled } from "../server/ensure-installed.mjs";
import { ensureChromium } from "./e2e/find-chromium.mjs";

/** `npm test`: everything that must hold before a change lands, from a bare checkout. Closes with one line that counts. */
const root = fileURLToPath(new URL("..", import.meta.url));
const results = `${root}/.build/test-results`;
const tally = { passed: 0, failed: 0 };
const startedMs = Date.now();

try {
  ensureInstalled(root, say);
} catch (error) {
  say(error.message);
  process.exit(1);
}
rmSync(results, { recursive: true, force: true });
mkdirSync(results, { recursive: true });

check("types", ["tsc", "-b"]);
check("lint and format", ["biome", "ci", "--config-path=test/lint/biome-rules.json", "--error-on-warnings", "."]);
check("dependency direction", [
  "depcruise",
  "--config",
  "test/lint/dependency-direction.cjs",
  ...["shared", "db", "server", "client", "test"],
]);
check("nothing unused", ["knip", "--config", "test/lint/knip.json"]);
tests("unit and API tests", "test/vitest.config.ts");
if (check("build of the page", ["vite", "build", "client", "--config", "client/vite.config.ts", "--logLevel", "warn"]))
  browserTests();
else fail("browser tests: not run, because the page could not be built");

say(`${Math.round((Date.now() - startedMs) / 1_000)} s`);
process.stdout.write(`${tally.passed} passed, ${tally.failed} failed\n`);
process.exit(tally.failed === 0 ? 0 : 1);

function browserTests() {
  try {
    process.env["CHROMIUM"] = ensureChromium(say);
  } catch (error) {
    fail(error.message);
    return;
  }
  tests("browser tests", "test/e2e/vitest.config.ts");
}

/** One command that either holds or does not. */
function check(what, command) {
  say(what);
  const holds = npx(command) === 0;
  tally[holds ? "passed" : "failed"]++;
  if (!holds) say(`FAILED: ${what}`);
  return holds;
}

/** A run of Vitest, counted test by test; one that ends without a count has failed. */
function tests(what, config) {
  say(what);
  const file = `${results}/${what.replaceAll(" ", "-")}.json`;
  const status = npx([
    "vitest",
    "run",
    "--config",
    config,
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${file}`,
  ]);
  const counted = existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : undefined;
  tally.passed += counted?.numPassedTests ?? 0;
  tally.failed += counted?.numFailedTests ?? 0;
  const skipped = (counted?.numPendingTests ?? 0) + (counted?.numTodoTests ?? 0);
  if (skipped > 0) fail(`${what}: ${skipped} skipped`);
  if (!(counted?.numPassedTests > 0)) fail(`${what}: no test ran`);
  if (status !== 0 && !(counted?.numFailedTests > 0)) fail(`${what}: ended with ${status}`);
}

function npx(command) {
  const shell = process.platform === "win32";
  return spawnSync("npx", ["--no-install", ...command], { cwd: root, stdio: ["ignore", "inherit", "inherit"], shell })
    .status;
}

function fail(text) {
  tally.failed++;
  say(`FAILED: ${text}`);
}

function say(text) {
  process.stdout.write(`\n== ${text}\n`);
}
