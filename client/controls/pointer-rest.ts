let down = false;
const note = (event: Event) => {
  down = event.type === "pointerdown";
};
for (const name of ["pointerdown", "pointerup", "pointercancel"]) addEventListener(name, note, { capture: true });

/**
 * Runs at once, or, while a mouse button or a finger is down, once it is up and its click is dealt with.
 * What is shown when a field is left would else push the very button away that is being pressed.
 */
export function oncePointerRests(run: () => void): void {
  if (!down) {
    run();
    return;
  }
  const ends = ["pointerup", "pointercancel"] as const;
  const rest = () => {
    for (const end of ends) removeEventListener(end, rest);
    setTimeout(run);
  };
  for (const end of ends) addEventListener(end, rest);
}
