import { useComputed, useSignal } from "@preact/signals";
import { useEffect } from "preact/hooks";
import type { RegimenContent } from "../../shared/contract/case.ts";
import { DomainError } from "../../shared/errors.ts";
import type { ArithmeticStep, ArithmeticSection as Worked } from "../../shared/figures/arithmetic/step.ts";
import { formatQuantity } from "../../shared/units/format.ts";
import type { CaseModel } from "../case/case-model.ts";
import { sayRefusal } from "../case/say-refusal.ts";
import { selectedKeyOf } from "./selected.ts";
import { useSettled } from "./use-settled.ts";
import "./arithmetic-section.css";

/** Digits of the program's own number that are shown beside the one worked by hand. */
const programDigits = 8;

/** The figures of the selected alternative worked out line by line, to be redone on a hand calculator. */
export function ArithmeticSection({ model }: { model: CaseModel }) {
  const content = useSettled(useComputed(() => model.contents.value.get(selectedKeyOf(model) ?? ""))).value;
  const open = useSignal(false);
  return (
    <section class="part" aria-labelledby="arithmetic-title">
      <h2 id="arithmetic-title">The arithmetic, worked</h2>
      {content === undefined ? (
        <p class="soft">The arithmetic appears here once there is an alternative to predict.</p>
      ) : (
        <details class="behind" onToggle={(event) => (open.value = event.currentTarget.open)}>
          <summary>How the figures of {content.regimenLabel} come about, with its numbers put in</summary>
          {open.value && <Lines content={content} />}
        </details>
      )}
    </section>
  );
}

type Answer = { readonly sections: readonly Worked[] } | { readonly problem: string };

/** Its code is loaded when somebody opens it. */
function Lines({ content }: { content: RegimenContent }) {
  const answer = useSignal<Answer | undefined>(undefined);
  useEffect(() => {
    let overtaken = false;
    work(content).then((worked) => {
      if (!overtaken) answer.value = worked;
    });
    return () => {
      overtaken = true;
    };
  }, [content]);
  const now = answer.value;
  if (now === undefined) return <p class="soft">Being worked out …</p>;
  if ("problem" in now) return <p class="readout-problem">{now.problem}</p>;
  return (
    <>
      <p>
        Each result is rounded as printed and carried on as printed, so that every line can be checked from this page
        alone.
      </p>
      {now.sections.map((section) => (
        <details key={section.title} class="worked" open>
          <summary>
            <h3>{section.title}</h3>
          </summary>
          {section.note && <p>{section.note}</p>}
          <ol class="worked-steps">
            {section.steps.map((step, index) => (
              <Step key={index} step={step} />
            ))}
          </ol>
        </details>
      ))}
    </>
  );
}

async function work(content: RegimenContent): Promise<Answer> {
  try {
    const { workedArithmetic } = await import("../../shared/figures/arithmetic/worked-arithmetic.ts");
    return { sections: workedArithmetic(content) };
  } catch (error) {
    if (error instanceof DomainError) return { problem: `Cannot be computed: ${sayRefusal(error, content.timeZone)}` };
    return { problem: "The arithmetic could not be loaded; load the page anew: what is typed is kept." };
  }
}

function Step({ step }: { step: ArithmeticStep }) {
  const { title, formula, substituted, result, unit, program } = step;
  return (
    <li>
      <p class="worked-title">{title}</p>
      <p class="worked-formula">{formula}</p>
      <p class="worked-numbers">
        = {substituted} = <strong>{result}</strong>
      </p>
      {program !== undefined && <p class="soft">The program has {formatQuantity(program, unit, programDigits)}.</p>}
    </li>
  );
}
