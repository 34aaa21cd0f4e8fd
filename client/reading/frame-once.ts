/** Calls back with the newest value once a frame, however many arrive in between; null cancels. */
export function frameOnce<Value>(paint: (value: Value) => void): (value: Value | null) => void {
  let waiting = false;
  let newest: Value | null = null;
  return (value) => {
    newest = value;
    if (waiting) return;
    waiting = true;
    requestAnimationFrame(() => {
      waiting = false;
      if (newest !== null) paint(newest);
    });
  };
}
