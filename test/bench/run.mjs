import { spawnSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { arch, cpus, loadavg, platform } from "node:os";
import { fileURLToPath } from "node:url";

/** `npm run bench`: builds, measures everything in one run, prints one table and keeps it in results.md. One part by its name. */
const root = fileURLToPath(new URL("../..", import.meta.url));
const only = process.argv.slice(2);
const parts = [
  { name: "kinetics", load: async () => (await import("./kinetics-bench.mjs")).kineticsBenchmarks() },
  { name: "http", load: async () => (await import("./http-bench.mjs")).httpBenchmarks() },
  { name: "page", load: async () => (await import("./page-bench.mjs")).pageBenchmarks() },
];

run(["tsc", "-b", "shared", "db", "server"]);
run(["vite", "build", "client", "--config", "client/vite.config.ts", "--logLevel", "warn"]);
const [loadBefore] = loadavg();
const lines = [];
for (const part of parts.filter(({ name }) => only.length === 0 || only.includes(name)))
  lines.push(...(await part.load()));

const table = tableOf(lines);
process.stdout.write(`${table}\n`);
if (only.length === 0) {
  writeFileSync(new URL("results.md", import.meta.url), page(table));
  run(["biome", "format", "--config-path=test/lint/biome-rules.json", "--write", "test/bench/results.md"]);
}
const missed = lines.filter(({ holds }) => holds === false).length;
process.stdout.write(`${lines.length - missed} of ${lines.length} lines without a missed target\n`);
process.exit(missed === 0 ? 0 : 1);

function run(command) {
  const { status } = spawnSync("npx", ["--no-install", ...command], {
    cwd: root,
    stdio: "inherit",
    shell: process.platform === "win32",
  });
  if (status !== 0) process.exit(status ?? 1);
}

function tableOf(rows) {
  const head = ["What", "Ours", "Against", "Unit", "Ratio", "Target", "Held", "Note"];
  const body = rows.map((row) =>
    row.why === undefined
      ? [
          row.name,
          short(row.ours),
          short(row.theirs),
          row.unit,
          short(row.ratio),
          row.target,
          row.holds ? "yes" : "NO",
          row.note,
        ]
      : [row.name, "", "", "", "", "", "not measured", row.why],
  );
  return [head, head.map(() => "---"), ...body].map((cells) => `| ${cells.join(" | ")} |`).join("\n");
}

function short(value) {
  return value >= 1000 ? Math.round(value).toLocaleString("en-US") : String(Number(value.toPrecision(3)));
}

function page(rows) {
  const machine = `Node ${process.version} on ${platform()} ${arch()}, ${cpus().length} cores, ${cpus()[0]?.model.trim()}`;
  return `# Measured speed

\`npm run bench\` on ${new Date().toISOString().slice(0, 10)}: ${machine}.

Ratios within one run; the quickest of several runs on both sides, since other work on a machine only adds time.
Load average at the start: ${loadBefore.toFixed(1)}. Above half the cores, the lines about the server and the page show
the other work as well.

${rows}
`;
}
