import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";

/**
 * Installs what the lockfile names, unless just that is installed already: a stamp of the lockfile and of
 * Node inside node_modules tells. Without packages, because it runs before there are any.
 *
 * @param {string} root folder of the project
 * @param {(text: string) => void} say told before the long wait
 * @throws {Error} if Node is too old or the installation fails
 */
export function ensureInstalled(root, say) {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (!(major > 20 || (major === 20 && minor >= 19)))
    throw new Error(`Ebbline needs Node 20.19 or later; this is ${process.versions.node}.`);
  const stampFile = `${root}/node_modules/.ebbline-installed`;
  const stamp = createHash("sha256")
    .update(readFileSync(`${root}/package-lock.json`))
    .update(process.version)
    .digest("hex");
  if (existsSync(stampFile) && readFileSync(stampFile, "utf8") === stamp) return;
  say("installing packages (once; where no built SQLite driver can be had, a C++ compiler makes it)");
  const result = spawnSync("npm", ["ci", "--include=dev", "--loglevel=error"], {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
    shell: process.platform === "win32",
  });
  if (result.status !== 0)
    throw new Error(`Could not install: npm ci ended with ${result.status ?? result.error?.message}.`);
  writeFileSync(stampFile, stamp);
}
