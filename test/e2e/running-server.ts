import { type ChildProcess, spawn } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const entry = fileURLToPath(new URL("../../.build/server/main.js", import.meta.url));

export interface RunningServer {
  readonly address: string;
  /** Stops the process as a supervisor would, and starts it again on the same database and port. */
  restart(): Promise<void>;
  stop(): Promise<void>;
}

/** The built program on a database of its own, with the demo case in it. */
export async function startServer(): Promise<RunningServer> {
  const folder = mkdtempSync(join(tmpdir(), "ebbline-e2e-"));
  const database = join(folder, "ebbline.sqlite");
  let running = await launch(database, "0");
  const { port } = new URL(running.address);
  return {
    address: running.address,
    async restart() {
      await end(running.child);
      running = await launch(database, port);
    },
    async stop() {
      await end(running.child);
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

function launch(database: string, port: string): Promise<{ address: string; child: ChildProcess }> {
  const env = { ...process.env, EBBLINE_DATABASE: database, PORT: port, EBBLINE_LOG_LEVEL: "error" };
  const child = spawn(process.execPath, [entry], { env, stdio: ["ignore", "pipe", "pipe"] });
  return new Promise((resolve, reject) => {
    let said = "";
    const hear = (chunk: Buffer) => {
      said += chunk.toString();
      const [address] = /http:\/\/\S+/.exec(said) ?? [];
      if (address !== undefined) resolve({ address, child });
    };
    child.stdout?.on("data", hear);
    child.stderr?.on("data", (chunk: Buffer) => {
      said += chunk.toString();
    });
    child.once("exit", (code) => reject(new Error(`the server ended with ${code} before it was ready: ${said}`)));
  });
}

function end(child: ChildProcess): Promise<void> {
  return new Promise((resolve) => {
    if (child.exitCode !== null) return resolve();
    child.once("exit", () => resolve());
    child.kill("SIGTERM");
  });
}
