/** An apostrophe in front of what a spreadsheet would take for a formula (OWASP: = + - @ tab, CR; full-width forms too). */
export const guarded = /^'+[=+\-@\t\r\uff1d\uff0b\uff0d\uff20]/;
