/** Calls once the next frame has been painted, so that what takes long does not hold it up. */
export function afterPaint(act: () => void): void {
  requestAnimationFrame(() => setTimeout(act));
}
