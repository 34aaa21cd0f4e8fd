import { announcement } from "./announce.ts";

/** Read out by a screen reader whenever it changes; always in the page, or it would not be. */
export function LiveRegion() {
  return (
    <p class="unseen" role="status" aria-live="polite">
      {announcement.value}
    </p>
  );
}
