import type { RegimenContent } from "../contract/case.ts";
import type { Dose } from "../contract/dose.ts";
import type { Instant, Order } from "../contract/schedule.ts";
import { hoursBetween, msPerHour, toLocal } from "./clock.ts";
import { elapsedDose } from "./elapsed-dose.ts";
import { spanOf } from "./expand-orders.ts";
import { type DueTime, dueTimes } from "./order-times.ts";
import { restWithin } from "./rest-within.ts";

/** What the repeating orders settle into, if they go on as they end. */
export type Cycle =
  | {
      readonly kind: "cycle";
      readonly cycleH: number;
      /** In hours from the start of the cycle, 0 up to cycleH. */
      readonly doses: readonly Dose[];
      /** When the first such cycle begins: all its orders run from here. */
      readonly startsAt: Instant;
      readonly orderIds: readonly string[];
    }
  | { readonly kind: "none"; readonly why: string };

/** Orders that meet again only after longer than this have no cycle that helps anybody. */
const longestCycleH = 672;
const secondsPerDay = 86_400;

interface Repeating {
  readonly order: Order;
  readonly when: Exclude<Order["when"], { kind: "once" }>;
  readonly periodS: number;
  readonly due: readonly DueTime[];
}

/**
 * The cycle of the orders that still run at the last repeating dose, as ordered: exceptions, records and
 * extra doses do not repeat. Its length is the least common multiple of the intervals; clock times repeat
 * every 24 h, and the hour that daylight saving takes or gives is left out.
 */
export function cycleOf(content: RegimenContent): Cycle {
  const running = stillRunning(repeatingOrders(content));
  if (running.length === 0) return { kind: "none", why: "no order repeats" };
  const cycleH = running.map(({ periodS }) => periodS).reduce(leastCommonMultiple) / 3_600;
  if (cycleH > longestCycleH)
    return {
      kind: "none",
      why: `the repeating orders meet again only after ${cycleH} h, longer than ${longestCycleH} h`,
    };
  const startsAt = running
    .map(({ due }) => due[0]!.at)
    .reduce((latest, at) => (hoursBetween(latest, at) > 0 ? at : latest));
  const lagH = content.setting.kinetics.lagH?.value ?? 0;
  const doses = running.flatMap((repeating) => cycleDoses(repeating, startsAt, cycleH, content.timeZone, lagH));
  return { kind: "cycle", cycleH, doses, startsAt, orderIds: running.map(({ order }) => order.id) };
}

function repeatingOrders(content: RegimenContent): Repeating[] {
  const span = spanOf(content);
  return content.schedule.orders.flatMap((order, index) => {
    const { when } = order;
    if (when.kind === "once") return [];
    const due = dueTimes(order, span, `schedule/orders/${index}`);
    const periodS = when.kind === "every" ? Math.round(when.intervalH * 3_600) : secondsPerDay;
    return due.length === 0 ? [] : [{ order, when, periodS, due }];
  });
}

/** An order runs as long as its last dose has not been followed by a whole period without one. */
function stillRunning(repeating: readonly Repeating[]): Repeating[] {
  const lastMs = Math.max(...repeating.map(({ due }) => Date.parse(due.at(-1)!.at)));
  // A day's clock times may lie 25 hours apart when the clock goes back.
  const slackMs = msPerHour;
  return repeating.filter(({ due, periodS, when }) => {
    const endsMs = Date.parse(due.at(-1)!.at) + periodS * 1_000 + (when.kind === "clock-times" ? slackMs : 0);
    return endsMs > lastMs;
  });
}

function cycleDoses(
  { order, when, due }: Repeating,
  startsAt: Instant,
  cycleH: number,
  zone: string,
  lagH: number,
): Dose[] {
  const { give } = order;
  if (when.kind === "every") {
    const phaseH = phase(hoursBetween(startsAt, due[0]!.at), when.intervalH);
    const times = Array.from(
      { length: Math.round(cycleH / when.intervalH) },
      (_, index) => phaseH + index * when.intervalH,
    );
    return times.map((atH) => elapsedDose(give, atH, lagH));
  }
  const startMinutes = minutesOfDay(toLocal(startsAt, zone).slice(11));
  return Array.from({ length: Math.round(cycleH / 24) }, (_, day) => day).flatMap((day) =>
    when.times.map(({ time, amountMg }) => {
      const atH = 24 * day + phase((minutesOfDay(time) - startMinutes) / 60, 24);
      return elapsedDose(amountMg === undefined || give.kind === "pump" ? give : { ...give, amountMg }, atH, lagH);
    }),
  );
}

function minutesOfDay(time: string): number {
  const [hours, minutes] = time.split(":").map(Number);
  return hours! * 60 + minutes!;
}

/** Tidied to a ten-millionth of an hour, so that a phase of 11.999999999 h is not taken for one of its own. */
function phase(value: number, divisor: number): number {
  const tidy = Number(restWithin(value, divisor).toFixed(7));
  return tidy >= divisor ? 0 : tidy;
}

function leastCommonMultiple(one: number, other: number): number {
  let [large, small] = [one, other];
  while (small > 0) [large, small] = [small, large % small];
  return (one / large) * other;
}
