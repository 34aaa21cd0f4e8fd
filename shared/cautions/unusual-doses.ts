import type { Caution } from "../contract/caution.ts";
import type { Give } from "../contract/schedule.ts";
import type { ContentSubject, CourseSubject, Rule } from "./subject.ts";
import { unusualValue } from "./unusual-value.ts";

/** Orders, exceptions, records and extra doses: each named where it stands, once. */
export const unusualOrders: Rule<ContentSubject> = ({ content: { schedule } }) => [
  ...schedule.orders.flatMap((order, index) => {
    const about = `/schedule/orders/${index}`;
    const interval = order.when.kind === "every" ? unusualValue("intervalH", order.when.intervalH, about) : [];
    const times =
      order.when.kind === "clock-times" ? order.when.times.flatMap((time) => unusualAmounts(time, about)) : [];
    const exceptions = order.exceptions.flatMap((exception, at) =>
      "skip" in exception ? [] : unusualAmounts(exception, `${about}/exceptions/${at}`),
    );
    return [...unusualGive(order.give, about), ...interval, ...times, ...exceptions];
  }),
  ...schedule.records.flatMap(({ outcome }, index) =>
    outcome.kind === "changed" ? unusualAmounts(outcome, `/schedule/records/${index}`) : [],
  ),
  ...schedule.extras.flatMap(({ give }, index) => unusualGive(give, `/schedule/extras/${index}`)),
];

/** Doses of a stateless request. */
export const unusualDoses: Rule<CourseSubject> = ({ course }) =>
  course.doses.flatMap((dose, index) => {
    const about = `/doses/${index}`;
    return dose.kind === "pump" ? unusualRate(dose.steps, about) : unusualAmounts(dose, about);
  });

function unusualGive(give: Give, about: string): Caution[] {
  return give.kind === "pump" ? unusualRate(give.steps, about) : unusualAmounts(give, about);
}

function unusualAmounts(given: { readonly amountMg?: number; readonly durationH?: number }, about: string): Caution[] {
  const { amountMg, durationH } = given;
  return [
    ...(amountMg === undefined ? [] : unusualValue("amountMg", amountMg, about)),
    ...(durationH === undefined ? [] : unusualValue("durationH", durationH, about)),
  ];
}

/** Only the highest: a thousand steps of one pump deserve one caution. */
function unusualRate(steps: readonly { readonly rateMgPerH: number }[], about: string): Caution[] {
  return unusualValue(
    "rateMgPerH",
    steps.reduce((highest, { rateMgPerH }) => Math.max(highest, rateMgPerH), 0),
    about,
  );
}
