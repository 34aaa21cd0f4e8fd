/** Hands a text to the browser as a file. The name keeps letters, digits and hyphens. */
export function downloadText(name: string, extension: "csv", text: string): void {
  // The mark at the start tells a spreadsheet that "mg·h/L" is UTF-8.
  const blob = new Blob(["\ufeff", text], { type: "text/csv;charset=utf-8" });
  const address = URL.createObjectURL(blob);
  const link = document.createElement("a");
  link.href = address;
  link.download = `${name.replace(/[^\p{L}\p{N}]+/gu, "-").replace(/^-|-$/g, "")}.${extension}`;
  link.click();
  // Some browsers read the address only after the click has been dealt with.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
