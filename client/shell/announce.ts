import { signal } from "@preact/signals";

/** The newest thing a screen reader should say without being asked. */
export const announcement = signal("");

/** Says one thing in the live region. */
export function announce(text: string): void {
  announcement.value = text;
}
