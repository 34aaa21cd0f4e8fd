import { describe, expect, test } from "vitest";
import { engineAnswers, givenIn } from "./worked-answers.ts";
import { type WorkedExample, workedExamples } from "./worked-examples.ts";

describe("worked examples", () => {
  for (const example of workedExamples) {
    test(`${example.id}, ${example.topic} (${example.seen ? "seen" : "not seen in print"}: ${example.source})`, () => {
      const answers = Object.entries(engineAnswers[example.id]!(givenIn(example))).filter(
        ([name]) => name in example.expected,
      );
      expect(answers.length).toBeGreaterThan(0);
      for (const [name, answer] of answers) {
        expectClose(
          example,
          name,
          answer,
          example.expected[name]!,
          (value) => example.tolerance.expected_rel * Math.abs(value),
        );
        const printed = example.published_as?.[name];
        if (printed !== undefined)
          expectClose(example, name, answer, printed, () => example.tolerance.published_abs![name]!);
      }
    });
  }

  test("every example has an answer, and every printed number but three is compared with one", () => {
    expect(Object.keys(engineAnswers).sort()).toEqual(workedExamples.map(({ id }) => id).sort());
    const left = workedExamples.flatMap((example) => {
      const answers = engineAnswers[example.id]!(givenIn(example));
      return Object.keys(example.published_as ?? {})
        .filter((name) => !(name in answers))
        .map((name) => `${example.id} ${name}`);
    });
    // Steps of a hand calculation that the engine does not take.
    expect(left).toEqual(["MUL-02 ratio", "MUL-02 k_tau", "ORL-06 accumulated_coefficient"]);
  });
});

/** An exact answer may miss what was printed by its rounding, and then by its own last digits. */
function expectClose(
  { id }: WorkedExample,
  name: string,
  answer: number | readonly number[],
  reference: number | readonly number[],
  allowed: (value: number) => number,
): void {
  const [got, wanted] = [[answer].flat(), [reference].flat()];
  expect(got.length, `${id} ${name}`).toBe(wanted.length);
  wanted.forEach((value, index) => {
    const slack = 1e-12 * Math.abs(value);
    expect(Math.abs(got[index]! - value), `${id} ${name}: ${got[index]} against ${value}`).toBeLessThanOrEqual(
      allowed(value) + slack,
    );
  });
}
