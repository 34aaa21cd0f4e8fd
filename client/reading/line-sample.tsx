import type { AlternativeLook } from "./alternative-look.ts";
import "./line-sample.css";

/** The letter of an alternative with a piece of its line: the same dashes and colour as on the chart. */
export function LineSample({ look }: { look: AlternativeLook }) {
  const ink = inkOf(look);
  return (
    <span class="line-sample">
      <b class={`line-letter ${ink}`}>{look.letter}</b>
      <svg class={ink} width="44" height="10" viewBox="0 0 44 10" aria-hidden="true" focusable="false">
        <line
          x1="0"
          y1="5"
          x2="44"
          y2="5"
          stroke="currentColor"
          stroke-width="2.5"
          stroke-dasharray={look.dash.join(" ") || undefined}
        />
      </svg>
    </span>
  );
}

/** The class that draws in an alternative's colour. */
export function inkOf({ colour }: Pick<AlternativeLook, "colour">): string {
  return `ink-${colour.at(-1)}`;
}
