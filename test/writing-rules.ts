/**
 * Faults of medication-safety writing in text meant for people. The patterns follow the published lists
 * (Joint Commission "Do Not Use" list; ISMP list of error-prone abbreviations; Australian Commission's
 * recommendations for terminology; NHS Common User Interface guidance), the no-break space is ours.
 */
const rules: readonly { readonly fault: string; readonly pattern: RegExp }[] = [
  { fault: "a trailing zero in a dose", pattern: /\d\.\d*0(?!\d)\s*(mg|g|microgram|units|mL)\b(?!\/)/g },
  { fault: "no zero before the point", pattern: /(?<![\d,])\.\d/g },
  { fault: "no space before the unit", pattern: /\d(mg|g|mL|L|h|units|microgram)\b/g },
  { fault: "a unit form that is misread", pattern: /[µμ]g|\bmcg\b|\bcc\b|\d\s*U\b|\bIU\b/g },
  { fault: "an abbreviation that is misread", pattern: /\bq\d+h\b|\b(QD|QOD|OD|BD|BID|TDS|TID|QID|QHS|PRN|stat)\b/g },
  { fault: "no comma for thousands", pattern: /(?<![\d,.])\d{4,}(?=\s*(mg|units|microgram)\b)/g },
  { fault: "a 12-hour time", pattern: /\b\d{1,2}(:\d\d)?\s?(am|pm)\b/gi },
  { fault: "a number that is none", pattern: /\b(NaN|undefined|null|Infinity)\b/g },
  { fault: "a slash in a rate", pattern: /\bmg\/h\b/g },
];

/**
 * Every fault in a text, with the words around it.
 *
 * @returns nothing where the text keeps the rules
 */
export function findWritingFaults(text: string): string[] {
  return rules.flatMap(({ fault, pattern }) =>
    [...text.matchAll(pattern)].map((match) => {
      const around = text.slice(Math.max(0, match.index - 30), match.index + match[0].length + 20).replace(/\s+/g, " ");
      return `${fault}: "${match[0]}" in "${around}"`;
    }),
  );
}
