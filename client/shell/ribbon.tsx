import { useSignal } from "@preact/signals";
import type { Caution } from "../../shared/contract/caution.ts";
import "./ribbon.css";

const severityWords = { stop: "Stop", warn: "Warning", note: "Note" } as const;

/** Wide enough to show the whole list without pushing the work off the screen. */
const wide = "(min-width: 60rem) and (min-height: 40rem)";

interface RibbonProps {
  readonly cautions: readonly Caution[];
  readonly about: string | undefined;
  readonly elsewhere: string | undefined;
}

/**
 * Everything the reader must know about what is on the page, gravest first, always in view. On a small
 * screen the list folds to its standing line and the count of each kind.
 */
export function Ribbon({ cautions, about, elsewhere }: RibbonProps) {
  const unfolded = useSignal(matchMedia(wide).matches);
  const standing = cautions.find(({ code }) => code === "standing");
  const others = cautions.filter((caution) => caution !== standing);
  return (
    <section class="ribbon" aria-label="Cautions">
      {standing && <p class="ribbon-standing">{standing.text}</p>}
      {elsewhere !== undefined && <p class="ribbon-elsewhere">{elsewhere}</p>}
      {others.length > 0 && (
        <div class="ribbon-others">
          <button
            type="button"
            class={`ribbon-fold has-${gravest(others)}`}
            aria-expanded={unfolded.value}
            aria-controls="ribbon-list"
            onClick={() => {
              unfolded.value = !unfolded.value;
            }}
          >
            <span aria-hidden="true">{unfolded.value ? "▾" : "▸"}</span> {about === undefined ? "" : `${about}: `}
            {sayCounts(others)}
          </button>
          {/* Scrolls when long, so it must be reachable by the keyboard. */}
          <ul
            id="ribbon-list"
            class="ribbon-list"
            hidden={!unfolded.value}
            tabIndex={0}
            aria-label="Cautions, gravest first"
          >
            {others.map((caution, index) => (
              <li key={`${caution.code} ${caution.about} ${index}`} class={`ribbon-${caution.severity}`}>
                <strong>{severityWords[caution.severity]}:</strong> {caution.text}
              </li>
            ))}
          </ul>
        </div>
      )}
    </section>
  );
}

function sayCounts(cautions: readonly Caution[]): string {
  const count = (severity: Caution["severity"]) => cautions.filter((caution) => caution.severity === severity).length;
  const say = (number: number, one: string, many: string) =>
    number === 0 ? [] : [`${number} ${number === 1 ? one : many}`];
  return [
    ...say(count("stop"), "caution to answer before saving", "cautions to answer before saving"),
    ...say(count("warn"), "warning", "warnings"),
    ...say(count("note"), "note", "notes"),
  ].join(", ");
}

function gravest(cautions: readonly Caution[]): Caution["severity"] {
  const has = (severity: Caution["severity"]) => cautions.some((caution) => caution.severity === severity);
  if (has("stop")) return "stop";
  return has("warn") ? "warn" : "note";
}
