import { type ChildProcess, execFileSync, spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { once } from "node:events";
import { join } from "node:path";
import { onTestFinished } from "vitest";
import { projectFolder } from "../../../db/project-folder.ts";

/** Compiles the server, so that what is run is what is delivered; takes a second when nothing changed. */
export function buildServer(): void {
  execFileSync(process.execPath, [
    join(projectFolder(), "node_modules", "typescript", "bin", "tsc"),
    "-b",
    join(projectFolder(), "server"),
  ]);
}

export interface Program {
  readonly child: ChildProcess;
  readonly address: string;
  /** What it has written so far. */
  readonly output: { stdout: string; stderr: string };
  /** Waits for its end. */
  readonly ended: Promise<{ code: number | null; signal: string | null }>;
}

/** Starts the built server with a file of its own, on a free port, and waits until it is ready. */
export async function startProgram(environment: Readonly<Record<string, string>>): Promise<Program> {
  const program = launch(environment);
  const address = await program.ready;
  return { ...program, address };
}

/** Starts the built server and waits for it to give up, or kills it on the way after some time. */
export async function runToItsEnd(
  environment: Readonly<Record<string, string>>,
  killAfterMs?: number,
): Promise<{ code: number | null; stdout: string; stderr: string }> {
  const program = launch(environment);
  if (killAfterMs !== undefined) setTimeout(() => program.child.kill("SIGKILL"), killAfterMs);
  program.ready.catch(() => undefined);
  const { code } = await program.ended;
  return { code, ...program.output };
}

function launch(environment: Readonly<Record<string, string>>) {
  const child = spawn(process.execPath, [join(projectFolder(), ".build", "server", "main.js")], {
    env: { PATH: process.env["PATH"] ?? "", PORT: "0", EBBLINE_LOG_LEVEL: "warn", ...environment },
    stdio: ["ignore", "pipe", "pipe"],
  });
  // A test that fails must leave no server behind.
  onTestFinished(() => void child.kill("SIGKILL"));
  const output = { stdout: "", stderr: "" };
  child.stderr.on("data", (chunk) => (output.stderr += String(chunk)));
  const ended = once(child, "close").then(([code, signal]) => ({
    code: code as number | null,
    signal: signal as string | null,
  }));
  const ready = new Promise<string>((resolve, reject) => {
    child.stdout.on("data", (chunk) => {
      output.stdout += String(chunk);
      const address = /^Ebbline is ready at (http:\/\/\S+)\n/.exec(output.stdout)?.[1];
      if (address !== undefined) resolve(address);
    });
    void ended.then(({ code, signal }) =>
      reject(new Error(`ended with ${code ?? signal} before it was ready: ${output.stderr}`)),
    );
  });
  return { child, output, ended, ready };
}

export interface Answer {
  readonly status: number;
  readonly body: { readonly [name: string]: unknown };
}

/** Posts JSON to a running program, as a page does. */
export async function post(address: string, path: string, body: unknown, key: string = randomUUID()): Promise<Answer> {
  const answer = await fetch(address + path, {
    method: "POST",
    headers: { "Content-Type": "application/json", "Idempotency-Key": key },
    body: JSON.stringify(body),
  });
  return { status: answer.status, body: (await answer.json()) as Answer["body"] };
}
