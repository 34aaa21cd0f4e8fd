import { spawnSync } from "node:child_process";
import { existsSync } from "node:fs";

const usualPlaces = [
  "/usr/bin/chromium",
  "/usr/bin/chromium-browser",
  "/usr/bin/google-chrome",
  "/Applications/Chromium.app/Contents/MacOS/Chromium",
  "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
];

const howTo = `The browser tests need Chromium, and none was found.
Either install it (Debian and Ubuntu: sudo apt-get install chromium), or set the variable CHROMIUM to the path of a Chromium or Chrome.`;

/** Path of a Chromium: the one named by CHROMIUM, or one in a usual place; undefined if there is none. */
export function findChromium() {
  const named = process.env["CHROMIUM"];
  return named ? (existsSync(named) ? named : undefined) : usualPlaces.find((path) => existsSync(path));
}

/**
 * A Chromium, installed with apt-get where this process may do that.
 *
 * @param {(text: string) => void} say told before the wait
 * @throws {Error} that says exactly how to bring one, if there is none
 */
export function ensureChromium(say) {
  const found = findChromium();
  if (found !== undefined) return found;
  if (process.env["CHROMIUM"])
    throw new Error(`The variable CHROMIUM names ${process.env["CHROMIUM"]}, which is not there.\n${howTo}`);
  const mayInstall = process.getuid?.() === 0 && spawnSync("apt-get", ["--version"]).status === 0;
  if (!mayInstall) throw new Error(howTo);
  say("installing Chromium with apt-get, for the browser tests");
  for (const args of [
    ["update", "-qq"],
    ["install", "-y", "-qq", "--no-install-recommends", "chromium", "fonts-dejavu-core"],
  ])
    spawnSync("apt-get", args, {
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    });
  const installed = findChromium();
  if (installed === undefined) throw new Error(howTo);
  return installed;
}
