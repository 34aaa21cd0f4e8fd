/** Where a browser keeps unsaved work of one case; the version is in the text, not in the name. */
export function keptName(caseId: string): string {
  return `ebbline.unsaved.${caseId}`;
}

/** What is kept under a name; undefined where there is nothing or the browser keeps nothing. */
export function readKept(name: string): string | undefined {
  try {
    return localStorage.getItem(name) ?? undefined;
  } catch {
    return undefined;
  }
}

/** @returns whether the browser took it: its store can be full or switched off */
export function writeKept(name: string, text: string): boolean {
  try {
    localStorage.setItem(name, text);
    return true;
  } catch {
    return false;
  }
}

export function dropKept(name: string): void {
  try {
    localStorage.removeItem(name);
  } catch {
    // Nothing could be kept, so nothing is there.
  }
}
