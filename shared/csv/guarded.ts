/** What a spreadsheet takes for the start of a formula (OWASP: = + - @, tab, CR, LF; full-width forms too), guarded or not. */
const risky = String.raw`[=+\-@\t\r\n\uff1d\uff0b\uff0d\uff20]`;

/** A text that needs an apostrophe in front; one that looks guarded needs another, so that reading takes off just the guard. */
export const needsGuard = new RegExp(`^'*${risky}`);

/** An apostrophe in front of what a spreadsheet would take for a formula. */
export const guarded = new RegExp(`^'+${risky}`);
