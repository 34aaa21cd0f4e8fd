/** Ticks from 0 in steps of 1, 2 or 5 times a power of ten, the last at or above the highest value. */
export function niceTicks(highest: number): number[] {
  const rough = highest / 5;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = ([1, 2, 5, 10].find((factor) => factor * power >= rough) ?? 10) * power;
  const count = Math.ceil(highest / step - 1e-9);
  return Array.from({ length: count + 1 }, (_, index) => Number((index * step).toPrecision(12)));
}

const hourSteps = [1, 2, 3, 6, 12, 24, 48, 72, 168, 336, 720, 1_440, 2_880];

/** Hours at which a clock time is written, at most `most` besides the first. */
export function timeTicksH(horizonH: number, most: number): number[] {
  const step = hourSteps.find((hours) => horizonH / hours <= most) ?? horizonH / most;
  const short = horizonH / most < hourSteps[0]! / 2 ? horizonH / most : step;
  return Array.from({ length: Math.floor(horizonH / short + 1e-9) + 1 }, (_, index) => index * short);
}
