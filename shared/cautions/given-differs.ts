import { givenDiffers } from "../schedule/course-of-content.ts";
import type { ContentSubject, Rule } from "./subject.ts";

/** Which of the two courses the figures belong to must never be in doubt. */
export const givenDoesDiffer: Rule<ContentSubject> = ({ content }) => {
  if (!givenDiffers(content)) return [];
  const text =
    "Not everything was given as planned. Levels are predicted from what was given; doses without a record count as given as planned.";
  return [{ code: "given-differs", severity: "note", text, about: "/schedule/records" }];
};
