import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { Solver } from "odex";
import { courseOf } from "../../.build/shared/kinetics/course.js";
import { levelsAt, levelsEvery } from "../../.build/shared/kinetics/levels.js";
import { walk } from "../../.build/shared/kinetics/walk.js";
import { bestMs, bestOfBothMs, line, notMeasured } from "./timing.mjs";
import { everyH, mixedInput, points, yearCourse, yearInput } from "./year-course.mjs";

const checkAt = [0, 359, 360, 100_000, 525_600];

/** The engine against a bare loop, naive superposition, an ODE solver, FFT convolution and a compiled filter; and its growth. */
export async function kineticsBenchmarks() {
  const course = yearCourse();
  const ourLevels = () => levelsEvery(walk(course), everyH);
  const levels = ourLevels();
  if (levels.length !== points) throw new Error(`expected ${points} points, got ${levels.length}`);
  const wanted = checkAt.map((point) => levels[point]);
  const bare = bestOfBothMs(ourLevels, bareLoop);
  return [
    line("a year by minutes: the curve, against a bare loop of one multiply-add a point", {
      ours: bare.ours,
      theirs: bare.theirs,
      unit: "ms",
      ratio: bare.ours / bare.theirs,
      target: { atMost: 2 },
    }),
    ...scipyLines(bare.ours, wanted),
    superpositionLine(bare.ours, wanted),
    odeLine(bare.ours, wanted),
    growthInDoses(),
    growthInPoints(),
  ];
}

/** What no curve can do without: one multiply-add a point into an array of its own. */
function bareLoop() {
  const levels = new Float64Array(points);
  const keep = Math.exp(-0.1 * everyH);
  let level = 8;
  for (let point = 0; point < points; point++) {
    levels[point] = level;
    level = level * keep + 0.001;
  }
  return levels;
}

function scipyLines(oursMs, wanted) {
  const names = ["the same, against FFT convolution (scipy)", "the same, against a compiled IIR filter (scipy)"];
  const { volumeL, eliminationRatePerH } = yearInput.parameters;
  const doses = yearInput.doses.map(({ atH, amountMg }) => [Math.round(atH / everyH), amountMg]);
  const child = spawnSync("python3", [fileURLToPath(new URL("rivals.py", import.meta.url))], {
    input: JSON.stringify({ points, everyH, eliminationRatePerH, volumeL, doses, checkAt }),
    encoding: "utf8",
  });
  if (child.status !== 0) return names.map((name) => notMeasured(name, "python3-scipy is absent"));
  const { fftMs, filterMs, fftLevels, filterLevels, scipy } = JSON.parse(child.stdout);
  sameLevels("FFT convolution", fftLevels, wanted, 1e-9);
  sameLevels("the IIR filter", filterLevels, wanted, 1e-9);
  const against = (name, theirs, atLeast) =>
    line(name, {
      ours: oursMs,
      theirs,
      unit: "ms",
      ratio: theirs / oursMs,
      target: { atLeast },
      note: `scipy ${scipy}`,
    });
  return [against(names[0], fftMs, 30), against(names[1], filterMs, 1)];
}

/** Every dose's exponential at every later point, as a spreadsheet would. Measured once: it takes seconds. */
function superpositionLine(oursMs, wanted) {
  const { volumeL, eliminationRatePerH: k } = yearInput.parameters;
  let levels;
  const theirs = bestMs(
    () => {
      levels = new Float64Array(points);
      for (const { atH, amountMg } of yearInput.doses)
        for (let point = Math.round(atH / everyH); point < points; point++)
          levels[point] += (amountMg / volumeL) * Math.exp(-k * (point * everyH - atH));
      return levels;
    },
    { runs: 1, budgetMs: 0 },
  );
  sameLevels(
    "superposition",
    checkAt.map((point) => levels[point]),
    wanted,
    1e-9,
  );
  return line("the same, against naive superposition", {
    ours: oursMs,
    theirs,
    unit: "ms",
    ratio: theirs / oursMs,
    target: { atLeast: 100 },
    note: "target of our own",
  });
}

/** A general extrapolation solver, started anew at each dose, with its own interpolation in between. */
function odeLine(oursMs, wanted) {
  const { volumeL, eliminationRatePerH: k } = yearInput.parameters;
  let levels;
  const theirs = bestMs(
    () => {
      levels = new Float64Array(points);
      const solver = new Solver(1);
      solver.denseOutput = true;
      solver.relativeTolerance = 1e-9;
      solver.absoluteTolerance = 1e-12;
      let level = 0;
      yearInput.doses.forEach(({ amountMg }, index) => {
        level += amountMg / volumeL;
        const first = 360 * index;
        let at = 0;
        const collect = solver.grid(everyH, (_, [value]) => {
          if (at < 360) levels[first + at++] = value;
        });
        level = solver.solve((_, [value]) => [-k * value], 0, [level], 6, collect).y[0];
      });
      levels[points - 1] = level;
      return levels;
    },
    { runs: 1, budgetMs: 0 },
  );
  sameLevels(
    "the ODE solver",
    checkAt.map((point) => levels[point]),
    wanted,
    1e-6,
  );
  return line("the same, against an ODE solver (odex, 1e-9)", {
    ours: oursMs,
    theirs,
    unit: "ms",
    ratio: theirs / oursMs,
    target: { atLeast: 30 },
    note: "target of our own",
  });
}

function growthInDoses() {
  const [few, many] = [1_000, 10_000].map((doses) => {
    const input = mixedInput(doses);
    const timesH = [0, input.horizonH / 2, input.horizonH];
    return () => levelsAt(walk(courseOf(input)), timesH);
  });
  const best = bestOfBothMs(many, few, { rounds: 15, repeats: 15 });
  return line("ten times the doses (10,000 against 1,000 of every kind): the walk", {
    ours: best.ours,
    theirs: best.theirs,
    unit: "ms",
    ratio: best.ours / best.theirs,
    target: { atMost: 11 },
  });
}

function growthInPoints() {
  const made = walk(yearCourse());
  const best = bestOfBothMs(
    () => levelsEvery(made, everyH),
    () => levelsEvery(made, 10 * everyH),
    { rounds: 15, repeats: 9 },
  );
  return line("ten times the points (525,601 against 52,561): the curve", {
    ours: best.ours,
    theirs: best.theirs,
    unit: "ms",
    ratio: best.ours / best.theirs,
    target: { atMost: 11 },
  });
}

/** A rival that answers something else is no rival. */
function sameLevels(rival, got, wanted, relative) {
  got.forEach((level, index) => {
    if (!(Math.abs(level - wanted[index]) <= relative * Math.max(...wanted)))
      throw new Error(`${rival} gives ${level} mg/L at point ${checkAt[index]}, the engine ${wanted[index]} mg/L`);
  });
}
