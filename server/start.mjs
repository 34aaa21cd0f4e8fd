#!/usr/bin/env node
import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { ensureInstalled } from "./ensure-installed.mjs";

/**
 * `npm start`: installs what the lockfile names, builds what has changed, and serves. Plain JavaScript
 * without packages, because it runs before anything is installed.
 */
const root = fileURLToPath(new URL("..", import.meta.url));
const onWindows = process.platform === "win32";

try {
  ensureInstalled(root, say);
} catch (error) {
  fail(error.message);
}
run("build", "npx", ["tsc", "-b", "shared", "db", "server"]);
run("build the page", "npx", ["vite", "build", "client", "--config", "client/vite.config.ts", "--logLevel", "warn"]);
await import(new URL("../.build/server/main.js", import.meta.url).href);

function run(what, command, args) {
  const result = spawnSync(command, args, { cwd: root, stdio: ["ignore", "inherit", "inherit"], shell: onWindows });
  if (result.error) fail(`Could not ${what}: ${result.error.message}`);
  if (result.status !== 0)
    fail(`Could not ${what}: ${command} ${args.join(" ")} ended with ${result.status ?? result.signal}.`);
}

/** To standard error: standard output holds the one line with the address. */
function say(text) {
  process.stderr.write(`Ebbline: ${text}\n`);
}

function fail(text) {
  say(text);
  process.exit(1);
}
