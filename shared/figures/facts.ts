import type { RegimenContent } from "../contract/case.ts";
import { limits } from "../contract/limits.ts";
import type { DoseRecord, Give, Order } from "../contract/schedule.ts";
import type { DatedEliminationChange, Origin, StatedKinetics } from "../contract/setting.ts";
import { hoursBetween, sayClock } from "../schedule/clock.ts";
import { sayGive, sayWhen } from "../schedule/say-order.ts";
import { formatDose, formatDuration, formatLevel, formatQuantity } from "../units/format.ts";
import { printedUnit } from "../units/printed-unit.ts";

/** One thing that an alternative states, in words with units; `path` stays the same while it is the same thing. */
export interface Fact {
  readonly path: string;
  readonly label: string;
  readonly words: string;
  /** Where it came from, where that is kept. */
  readonly origin?: string;
  /** All of it, where `words` are cut: what tells two long pump logs apart. */
  readonly whole?: string;
}

/** Digits with which an entered value is repeated: all that anybody types. */
const enteredDigits = 12;

/** Everything that one alternative states, in the order in which it is read. */
export function factsOf(content: RegimenContent): Fact[] {
  return [...settingFacts(content), ...scheduleFacts(content)];
}

/** Who and what drug: the plan, the kinetics, the start, the range and changes of elimination. */
export function settingFacts(content: RegimenContent): Fact[] {
  const { setting, timeZone } = content;
  const { startConcentration, rangeMgPerL } = setting;
  return [
    { path: "timeZone", label: "Time zone", words: timeZone },
    { path: "setting/plan/start", label: "Start of the plan", words: sayClock(setting.plan.start, timeZone) },
    { path: "setting/plan/horizonH", label: "Length of the plan", words: entered(setting.plan.horizonH, "h") },
    ...kineticFacts(setting.kinetics),
    ...(startConcentration === undefined
      ? []
      : [
          {
            path: "setting/startConcentration",
            label: "Level already present at the start",
            words: entered(startConcentration.valueMgPerL, "mg/L"),
            origin: sayOrigin(startConcentration.origin),
          },
        ]),
    ...(rangeMgPerL === undefined
      ? []
      : [
          {
            path: "setting/rangeMgPerL",
            label: "Desired range",
            words: `${formatLevel(rangeMgPerL.low)} to ${formatLevel(rangeMgPerL.high)}`,
          },
        ]),
    ...setting.eliminationChanges.map((change) => ({
      path: `setting/eliminationChanges/${change.id}`,
      label: "Changed elimination",
      words: sayEliminationChange(change, timeZone),
      origin: sayOrigin(change.origin),
    })),
  ];
}

/** Orders, exceptions, records, extra doses and the reasons given for cautions. */
export function scheduleFacts(content: RegimenContent): Fact[] {
  const { schedule, timeZone } = content;
  const numberOf = (orderId: string) => schedule.orders.findIndex(({ id }) => id === orderId) + 1;
  return [
    { path: "regimenLabel", label: "Name of the alternative", words: content.regimenLabel },
    ...schedule.orders.flatMap((order, index) => orderFacts(order, index + 1, timeZone)),
    ...schedule.records.map((record) => ({
      path: `schedule/records/${record.orderId}#${record.occurrence}`,
      label: `Given: order ${numberOf(record.orderId)}, dose ${record.occurrence + 1}`,
      words: withNote(sayOutcome(record, timeZone), record.note),
    })),
    ...schedule.extras.map(({ id, at, give, note }) => {
      const { words, ...rest } = giveWords(give);
      const dated = withNote(`${words}, ${sayClock(at, timeZone)}`, note);
      return { path: `schedule/extras/${id}`, label: "Extra dose given", words: dated, ...rest };
    }),
    ...content.cautionReasons.map(({ code, about, text, reason }) => ({
      path: `cautionReasons/${code}/${about}`,
      label: "Reason given for a caution",
      words: `${reason} (caution: ${text})`,
    })),
  ];
}

/** A change of elimination in words. */
export function sayEliminationChange(change: DatedEliminationChange, timeZone: string): string {
  const from = `from ${sayClock(change.from, timeZone)}`;
  if (change.kind === "rate") return `k becomes ${entered(change.eliminationRatePerH, "per h")} ${from}`;
  if (change.kind === "clearance") return `CL becomes ${entered(change.clearanceLPerH, "L/h")} ${from}`;
  const length = formatDuration(hoursBetween(change.from, change.until));
  return `${entered(change.addedClearanceLPerH, "L/h")} added ${from} to ${sayClock(change.until, timeZone)} (${length})`;
}

export function sayOrigin(origin: Origin): string {
  return origin.note.trim() === "" ? "typed, without a note" : `typed: ${origin.note.trim()}`;
}

function kineticFacts(kinetics: StatedKinetics): Fact[] {
  return Object.entries(kinetics).map(([name, { value, origin }]) => {
    const { label } = limits[name as keyof StatedKinetics];
    const printed = printedUnit(name as keyof StatedKinetics);
    return { path: `setting/kinetics/${name}`, label, words: entered(value, printed), origin: sayOrigin(origin) };
  });
}

function orderFacts(order: Order, number: number, timeZone: string): Fact[] {
  const path = `schedule/orders/${order.id}`;
  return [
    { path: `${path}/give`, label: `Order ${number}: what`, ...giveWords(order.give) },
    { path: `${path}/when`, label: `Order ${number}: when`, words: sayWhen(order.when, timeZone) },
    ...(order.note === "" ? [] : [{ path: `${path}/note`, label: `Order ${number}: note`, words: order.note }]),
    ...order.exceptions.map((exception) => ({
      path: `${path}/exceptions/${exception.occurrence}`,
      label: `Order ${number}, dose ${exception.occurrence + 1}: planned otherwise`,
      words: "skip" in exception ? "left out" : sayChange(exception, timeZone),
    })),
  ];
}

/** More steps of a pump than this are not read; how many there are is said. */
const mostSteps = 40;

function giveWords(give: Give): Pick<Fact, "words" | "whole"> {
  if (give.kind !== "pump") return { words: sayGive(give) };
  const steps = give.steps.map(
    ({ afterH, rateMgPerH }) => `${entered(rateMgPerH, "mg per hour")} from ${entered(afterH, "h")}`,
  );
  const rest = steps.length - mostSteps;
  const shown = `${sayGive(give)}: ${steps.slice(0, mostSteps).join(", ")}`;
  return rest > 0 ? { words: `${shown}, and ${rest} more steps`, whole: steps.join(", ") } : { words: shown };
}

function sayOutcome({ outcome }: DoseRecord, timeZone: string): string {
  if (outcome.kind === "as-planned") return "as planned";
  return outcome.kind === "omitted" ? "omitted" : sayChange(outcome, timeZone);
}

function sayChange(change: { at?: string; amountMg?: number; durationH?: number }, timeZone: string): string {
  const parts = [
    change.amountMg !== undefined && formatDose(change.amountMg),
    change.durationH !== undefined && `over ${formatDuration(change.durationH)}`,
    change.at !== undefined && sayClock(change.at, timeZone),
  ].filter(Boolean);
  return parts.length === 0 ? "no change stated" : parts.join(", ");
}

function withNote(words: string, note: string): string {
  return note.trim() === "" ? words : `${words} (${note.trim()})`;
}

function entered(value: number, unit: string): string {
  return formatQuantity(value, unit, enteredDigits);
}
