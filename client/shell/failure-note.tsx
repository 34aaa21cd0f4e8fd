import type { Failure } from "../http/answer.ts";
import { focusOn } from "./focus.ts";
import "./failure-note.css";

interface FailureNoteProps {
  readonly failure: Failure;
  readonly onRetry?: () => void;
  /** Where a problem's field is on the page; without one its detail stands alone. */
  readonly fieldOf?: (pointer: string) => { readonly id: string; readonly label: string } | undefined;
}

/** What the server did not do, why, and which fields to look at; read out as soon as it appears. */
export function FailureNote({ failure, onRetry, fieldOf }: FailureNoteProps) {
  return (
    <div class="failure" role="alert">
      <p class="failure-title">{failure.title}</p>
      {failure.detail && <p>{failure.detail}</p>}
      {failure.errors.length > 0 && (
        <ul>
          {failure.errors.map(({ pointer, detail }) => {
            const field = fieldOf?.(pointer);
            return (
              <li key={`${pointer} ${detail}`}>
                {field ? (
                  <a href={`#${field.id}`} onClick={goTo(field.id)}>
                    {field.label}
                  </a>
                ) : (
                  <code>{pointer.replace(/^#\/?/, "") || "the whole"}</code>
                )}
                : {detail}
              </li>
            );
          })}
        </ul>
      )}
      {onRetry && (
        <button type="button" class="button" onClick={onRetry}>
          Try again
        </button>
      )}
    </div>
  );
}

function goTo(id: string) {
  return (event: Event) => {
    event.preventDefault();
    focusOn(id);
  };
}
