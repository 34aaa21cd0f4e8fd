import type { UnsavedWork } from "../case/case-page.ts";

/** Unsaved work as kept text, the form of `readUnsaved`. */
export function writeUnsaved({ document, drafts, baseVersion }: UnsavedWork, keptAt: Date): string {
  const { setting: _, ...rest } = document;
  return JSON.stringify({
    format: "ebbline-unsaved",
    formatVersion: 1,
    keptAt: keptAt.toISOString(),
    baseVersion,
    document: rest,
    drafts,
  });
}
