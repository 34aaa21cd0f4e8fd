import type { Caution } from "../../shared/contract/caution.ts";

type Wording = Pick<Caution, "code" | "about" | "text">;

/** A reason answers one caution as it was worded: given for one value, it does not answer for the next. */
export function isAbout(one: Wording, other: Wording): boolean {
  return one.code === other.code && one.about === other.about && one.text === other.text;
}
