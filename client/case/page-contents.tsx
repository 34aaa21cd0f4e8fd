import { focusOn } from "../shell/focus.ts";
import "./page-contents.css";

/** The parts of a case's page, by the ids of their headings, in the order they are read. */
const parts = [
  { id: "setting-title", title: "Who and what drug" },
  { id: "changes-title", title: "Changing elimination" },
  { id: "alternatives-title", title: "Alternatives" },
  { id: "orders-title", title: "Orders" },
  { id: "doses-title", title: "Doses" },
  { id: "curve-title", title: "Levels over time" },
  { id: "remains-title", title: "What remains" },
  { id: "figures-title", title: "Figures" },
  { id: "wait-title", title: "How long to wait" },
  { id: "arithmetic-title", title: "Arithmetic" },
  { id: "save-title", title: "Save, sheet and revisions" },
] as const;

/** Links to the parts of a long page. */
export function PageContents() {
  const go = (id: string) => (event: Event) => {
    event.preventDefault();
    document.getElementById(id)?.scrollIntoView();
    focusOn(id);
  };
  return (
    <nav class="contents" aria-label="On this page">
      <ul>
        {parts.map(({ id, title }) => (
          <li key={id}>
            <a href={`#${id}`} onClick={go(id)}>
              {title}
            </a>
          </li>
        ))}
      </ul>
    </nav>
  );
}
