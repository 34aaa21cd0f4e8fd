import { sayClock } from "../schedule/clock.ts";
import type { ContentSubject, Rule } from "./subject.ts";

const oneMinuteH = 1 / 60;

/** Two doses of one alternative within a minute: a loading dose on top of the first maintenance dose, or a slip. */
export const dosesTogether: Rule<ContentSubject> = ({ content, doses }) => {
  const close = doses.filter((dose, index) => index > 0 && dose.atH - doses[index - 1]!.atH < oneMinuteH);
  const [first] = close;
  if (first === undefined) return [];
  const times = close.length === 1 ? "" : `, and at ${close.length - 1} other times`;
  const text = `Two doses are given at the same time: ${sayClock(first.at, content.timeZone)}${times}. Check that both are meant.`;
  return [{ code: "doses-together", severity: "warn", text, about: "/schedule" }];
};
