import type { RegimenContent } from "../contract/case.ts";
import { type Fact, factsOf } from "./facts.ts";

/** One field in which two revisions differ; an empty text means the revision has no such thing. */
export interface Difference {
  readonly path: string;
  readonly label: string;
  readonly before: string;
  readonly after: string;
}

/** All fields in which two alternatives differ, origins included, in the order in which they are read. */
export function differencesOf(before: RegimenContent, after: RegimenContent): Difference[] {
  const old = keyed(factsOf(before));
  const fresh = keyed(factsOf(after));
  return [...new Set([...fresh.keys(), ...old.keys()])].flatMap((path) => {
    const one = old.get(path);
    const other = fresh.get(path);
    const [said, saidThen] = [one, other].map((fact) => (fact === undefined ? "" : withOrigin(fact)));
    if (said === saidThen && one?.whole === other?.whole) return [];
    const after = said === saidThen ? `${saidThen}; other steps among those not shown` : saidThen!;
    return [{ path, label: (other ?? one)!.label, before: said!, after }];
  });
}

function keyed(facts: readonly Fact[]): Map<string, Fact> {
  return new Map(facts.map((fact) => [fact.path, fact]));
}

function withOrigin({ words, origin }: Fact): string {
  return origin === undefined ? words : `${words} (${origin})`;
}
