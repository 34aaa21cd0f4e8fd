import type { z } from "zod";

/**
 * What is allowed where the contract has no words of its own, in ours: the library's default wording
 * speaks of types and received values to a programmer.
 */
export const sayIssue: z.core.$ZodErrorMap = (issue) => {
  switch (issue.code) {
    case "invalid_type":
      return `must be ${kinds[issue.expected] ?? issue.expected}`;
    case "too_small":
      return sayLimit(issue.origin, "at least", Number(issue.minimum));
    case "too_big":
      return sayLimit(issue.origin, "at most", Number(issue.maximum));
    case "invalid_value":
      return `must be ${oneOf(issue.values)}`;
    case "invalid_union":
      return "options" in issue && Array.isArray(issue.options)
        ? `must be ${oneOf(issue.options)}`
        : "must have one of the forms listed at /api/docs";
    case "invalid_format":
      return issue.format === "uuid" ? "must be a UUID" : "must have the form described at /api/docs";
    default:
      return "is not allowed here";
  }
};

const kinds: Readonly<Record<string, string>> = {
  string: "text",
  number: "a number",
  int: "a whole number",
  boolean: "true or false",
  array: "a list",
  object: "an object",
};

const counted: Readonly<Record<string, string>> = { string: "characters", array: "entries" };

function sayLimit(origin: string, bound: "at least" | "at most", limit: number): string {
  const what = counted[origin];
  return what === undefined ? `must be ${bound} ${limit}` : `must hold ${bound} ${limit} ${what}`;
}

function oneOf(values: readonly unknown[]): string {
  const said = values.map((value) => JSON.stringify(value));
  return said.length < 2 ? said.join("") : `${said.slice(0, -1).join(", ")} or ${said.at(-1)}`;
}
