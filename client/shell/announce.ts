import { signal } from "@preact/signals";

/** The newest thing a screen reader should say without being asked. */
export const announcement = signal("");

/** Says one thing in the live region; the same words once more, too, which an unchanged text would not be. */
export function announce(text: string): void {
  announcement.value = announcement.peek() === text ? `${text}\u00a0` : text;
}
