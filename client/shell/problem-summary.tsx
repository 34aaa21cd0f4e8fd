import "./problem-summary.css";

interface ProblemSummaryProps {
  readonly id: string;
  /** Problems by field name. */
  readonly problems: Readonly<Record<string, string>>;
  readonly fieldId: (field: string) => string;
}

/** What keeps a form from being applied, each with the way to its field; gets the focus when it appears. */
export function ProblemSummary({ id, problems, fieldId }: ProblemSummaryProps) {
  const entries = Object.entries(problems);
  if (entries.length === 0) return null;
  const goto = (field: string) => (event: Event) => {
    event.preventDefault();
    document.getElementById(fieldId(field))?.focus();
  };
  return (
    <div class="problems" id={id} role="alert" tabIndex={-1}>
      <p>{entries.length === 1 ? "One field is not right yet:" : `${entries.length} fields are not right yet:`}</p>
      <ul>
        {entries.map(([field, problem]) => (
          <li key={field}>
            <a href={`#${fieldId(field)}`} onClick={goto(field)}>
              {problem}
            </a>
          </li>
        ))}
      </ul>
    </div>
  );
}
