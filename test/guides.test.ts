import { existsSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";

const root = new URL("../", import.meta.url);
const read = (name: string) => readFileSync(new URL(name, root), "utf8");

describe("the guides", () => {
  test("every hazard of SAFETY.md names tests that are there", () => {
    const rows = read("SAFETY.md")
      .split("\n")
      .filter((line) => line.startsWith("| ") && !line.startsWith("| Hazard") && !line.startsWith("| ---"));
    expect(rows.length).toBeGreaterThan(15);
    for (const row of rows) {
      const shown = row.split("|").at(-2)!;
      const tests = shown.match(/[\w/-]+\.test\.ts/g) ?? [];
      expect(tests.length, row).toBeGreaterThan(0);
      for (const name of tests) expect(existsSync(new URL(`test/${name}`, root)), name).toBe(true);
    }
  });

  test.for(["README.md", "DEVELOPERS.md", "SAFETY.md"])("%s names files that are there", (name) => {
    const linked = [...read(name).matchAll(/\]\(([^)#]+)\)/g)].map(([, path]) => path!);
    const coded = [...read(name).matchAll(/`((?:shared|server|client|db|test)\/[\w./-]+)`/g)].map(([, path]) => path!);
    for (const path of [...linked, ...coded.filter((path) => !path.includes("NNNN"))]) {
      if (/^https?:/.test(path)) continue;
      expect(existsSync(new URL(path, root)), `${path} in ${name}`).toBe(true);
    }
  });
});
