/** Text that is known to be safe as HTML, because only `html` makes it. */
export class Markup {
  readonly text: string;

  constructor(text: string) {
    this.text = text;
  }
}

type Part = string | number | Markup | readonly Markup[];

/** HTML with every value escaped; only other markup goes in as it is. */
export function html(fixed: TemplateStringsArray, ...parts: readonly Part[]): Markup {
  return new Markup(fixed.reduce((all, piece, index) => all + write(parts[index - 1]!) + piece));
}

function write(part: Part): string {
  if (part instanceof Markup) return part.text;
  if (typeof part === "object") return part.map(({ text }) => text).join("");
  return String(part)
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replaceAll("'", "&#39;");
}
