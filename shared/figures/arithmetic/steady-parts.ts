import type { Course } from "../../kinetics/course.ts";
import { restWithin } from "../../schedule/rest-within.ts";
import { partsOf } from "./parts.ts";
import { type ArithmeticStep, carried, put, step } from "./step.ts";

/** What one cycle's lines are worked out with: the values as printed. */
export interface HandCycle {
  readonly volumeL: number;
  readonly clearanceLPerH: number;
  readonly k: number;
  readonly cycleH: number;
  /** 1 / (1 - e^(-k P)), as printed. */
  readonly accumulation: number;
  readonly course: Course;
}

/** A level is read just before or just after what is given at its hour. */
export interface Reading {
  readonly atH: number;
  readonly side: "before" | "after";
}

const sameHourH = 1e-7;

/** One summand of a level at steady state: what one part of the cycle leaves, from all cycles before. */
export interface Share {
  readonly title: string;
  readonly formula: string;
  readonly substituted: string;
  readonly value: number;
}

/** Shares of a level at steady state; undefined where a textbook formula would lose its digits (ka close to k). */
export function sharesAt(cycle: HandCycle, reading: Reading): Share[] | undefined {
  const { course, k } = cycle;
  const ka = course.absorptionRatePerH;
  const parts = partsOf(course);
  if (parts.some(({ kind }) => kind === "absorbed") && Math.abs(ka! - k) < 0.001 * k) return undefined;
  return parts.flatMap((part): Share[] => {
    const title = `dose at ${put(carried(part.atH), "h")}`;
    if (part.kind === "bolus") return [bolusShare(cycle, reading, part, title)];
    if (part.kind === "absorbed") return [absorbedShare(cycle, reading, part, title)];
    return rateShares(cycle, reading, part, title);
  });
}

/** The line of a level: its share where there is one, else the shares and their sum. */
export function levelSteps(title: string, shares: readonly Share[], program: number): ArithmeticStep[] {
  if (shares.length === 1) return [step({ ...shares[0]!, title, unit: "mg/L", program })];
  const lines = shares.map((share) => step({ ...share, title: `${title}: share of the ${share.title}`, unit: "mg/L" }));
  const values = lines.map(({ value }) => value);
  const sum = values.reduce((total, value) => total + value, 0);
  const substituted = values.map((value) => put(value, "mg/L")).join(" + ");
  return [...lines, step({ title, formula: "sum of the shares", substituted, value: sum, unit: "mg/L", program })];
}

type Dosed = { readonly atH: number; readonly amountMg: number };

function bolusShare(cycle: HandCycle, reading: Reading, { atH, amountMg }: Dosed, title: string): Share {
  const { volumeL, k, cycleH, accumulation, course } = cycle;
  const u = hoursSince(atH, reading, cycleH);
  const decay = u === 0 ? "" : ` × e^(−${put(k, "per h")} × ${put(u, "h")})`;
  return {
    title: `bolus, ${title}`,
    formula: `${salted(course)}D ÷ V${u === 0 ? "" : " × e^(−k × u)"} × A`,
    substituted: `${saltedNumber(course)}${put(amountMg, "mg")} ÷ ${put(volumeL, "L")}${decay} × ${put(accumulation, "")}`,
    value: ((course.saltFactor * amountMg) / volumeL) * Math.exp(-k * u) * accumulation,
  };
}

function rateShares(
  cycle: HandCycle,
  reading: Reading,
  part: { readonly atH: number; readonly hours: number; readonly rateMgPerH: number },
  title: string,
): Share[] {
  const { cycleH } = cycle;
  const whole = Math.floor(part.hours / cycleH + 1e-9);
  const restH = carried(part.hours - whole * cycleH);
  const constant = whole > 0 ? [constantShare(cycle, whole * part.rateMgPerH, title)] : [];
  return restH > sameHourH ? [...constant, boxShare(cycle, reading, { ...part, hours: restH }, title)] : constant;
}

function constantShare({ clearanceLPerH, course }: HandCycle, rateMgPerH: number, title: string): Share {
  return {
    title: `constant rate, ${title}`,
    formula: `${salted(course)}R ÷ CL`,
    substituted: `${saltedNumber(course)}${put(carried(rateMgPerH), "mg per hour")} ÷ ${put(clearanceLPerH, "L/h")}`,
    value: (course.saltFactor * rateMgPerH) / clearanceLPerH,
  };
}

function boxShare(
  cycle: HandCycle,
  reading: Reading,
  { atH, hours: T, rateMgPerH }: { readonly atH: number; readonly hours: number; readonly rateMgPerH: number },
  title: string,
): Share {
  const { clearanceLPerH, k, cycleH: P, accumulation: A, course } = cycle;
  const since = hoursSince(atH, reading, P);
  const rate = carried(rateMgPerH);
  const plateau = `${saltedNumber(course)}${put(rate, "mg per hour")} ÷ ${put(clearanceLPerH, "L/h")}`;
  const level = (course.saltFactor * rate) / clearanceLPerH;
  const whole = `(1 − e^(−${put(k, "per h")} × ${put(T, "h")}))`;
  const start = `${salted(course)}R ÷ CL × `;
  if (since < T - sameHourH) {
    const afterEndH = carried(P + since - T);
    return {
      title: `infusion, ${title}`,
      formula: `${start}[1 − e^(−k × u) + (1 − e^(−k × T)) × e^(−k × (P + u − T)) × A]`,
      substituted: `${plateau} × [1 − e^(−${put(k, "per h")} × ${put(since, "h")}) + ${whole} × e^(−${put(k, "per h")} × ${put(afterEndH, "h")}) × ${put(A, "")}]`,
      value: level * (1 - Math.exp(-k * since) + (1 - Math.exp(-k * T)) * Math.exp(-k * afterEndH) * A),
    };
  }
  const restH = Math.max(0, carried(since - T));
  const ended = restH <= sameHourH;
  return {
    title: `infusion, ${title}`,
    formula: `${start}(1 − e^(−k × T))${ended ? "" : " × e^(−k × (u − T))"} × A`,
    substituted: `${plateau} × ${whole}${ended ? "" : ` × e^(−${put(k, "per h")} × ${put(restH, "h")})`} × ${put(A, "")}`,
    value: level * (1 - Math.exp(-k * T)) * Math.exp(-k * (ended ? 0 : restH)) * A,
  };
}

function absorbedShare(cycle: HandCycle, reading: Reading, { atH, amountMg }: Dosed, title: string): Share {
  const { volumeL, k, cycleH: P, accumulation: A, course } = cycle;
  const ka = course.absorptionRatePerH!;
  const u = carried(restWithin(reading.atH - atH, P));
  const { bioavailability: F, saltFactor: S } = course;
  const amount = `${F === 1 ? "" : `${put(F, "")} × `}${saltedNumber(course)}${put(amountMg, "mg")}`;
  const head = `${amount} × ${put(ka, "per h")} ÷ [${put(volumeL, "L")} × (${put(ka, "per h")} − ${put(k, "per h")})]`;
  const fast = `e^(−${put(ka, "per h")} × ${put(u, "h")}) ÷ (1 − e^(−${put(ka, "per h")} × ${put(P, "h")}))`;
  return {
    title: `absorbed dose, ${title}`,
    formula: `${F === 1 ? "" : "F × "}${salted(course)}D × ka ÷ [V × (ka − k)] × [e^(−k × u) × A − e^(−ka × u) ÷ (1 − e^(−ka × P))]`,
    substituted: `${head} × [e^(−${put(k, "per h")} × ${put(u, "h")}) × ${put(A, "")} − ${fast}]`,
    value:
      ((F * S * amountMg * ka) / (volumeL * (ka - k))) *
      (Math.exp(-k * u) * A - Math.exp(-ka * u) / (1 - Math.exp(-ka * P))),
  };
}

/** Hours since the latest such dose, as printed; a dose at the reading's own hour is the last cycle's if read before it. */
function hoursSince(atH: number, reading: Reading, cycleH: number): number {
  const since = restWithin(reading.atH - atH, cycleH);
  const own = since < sameHourH || since > cycleH - sameHourH;
  if (own) return reading.side === "before" ? cycleH : 0;
  return carried(since);
}

function salted({ saltFactor }: Course): string {
  return saltFactor === 1 ? "" : "S × ";
}

function saltedNumber({ saltFactor }: Course): string {
  return saltFactor === 1 ? "" : `${put(saltFactor, "")} × `;
}
