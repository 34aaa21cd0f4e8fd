import { spawn } from "node:child_process";
import { mkdtempSync, openSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

/** Servers of their own for one measurement, with a folder that goes when they do. */
export function serverGroup() {
  const folder = mkdtempSync(join(tmpdir(), "ebbline-bench-"));
  const log = join(folder, "log");
  const children = [];
  return {
    /** The whole server as `npm start` runs it, on a database of its own, its log going to a file. */
    whole: () =>
      start("../../.build/server/main.js", [], {
        PORT: "0",
        EBBLINE_DATABASE: join(folder, "bench.sqlite"),
        EBBLINE_REQUESTS_PER_MINUTE: "900000000",
      }),
    /** An Express server with one route that answers so many bytes. */
    empty: (bytes) => start("empty-route.mjs", [String(bytes)], {}),
    async end() {
      await Promise.all(children.map(ended));
      rmSync(folder, { recursive: true, force: true });
    },
  };

  /** Resolves to the address in the line that says the server is ready. */
  function start(script, rest, environment) {
    const path = fileURLToPath(new URL(script, import.meta.url));
    const child = spawn(process.execPath, [path, ...rest], {
      env: { ...process.env, NODE_ENV: "production", ...environment },
      stdio: ["ignore", "pipe", openSync(log, "a")],
    });
    children.push(child);
    return new Promise((resolve, reject) => {
      let said = "";
      child.stdout.on("data", (text) => {
        said += text;
        const address = /ready at (http:\S+)/.exec(said);
        if (address !== null) resolve(address[1]);
      });
      child.once("exit", (code) => {
        reject(
          new Error(
            `${script} ended with ${code} before it was ready: ${said}${readFileSync(log, "utf8").slice(-500)}`,
          ),
        );
      });
    });
  }
}

function ended(child) {
  return new Promise((resolve) => {
    if (child.exitCode !== null) return resolve();
    child.once("exit", resolve);
    child.kill("SIGTERM");
  });
}
