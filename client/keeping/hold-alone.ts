/**
 * Holds a name for this tab: of several tabs of one browser only one has it, the next one gets it when
 * the first is closed. Without the Web Locks API (plain HTTP from another machine) every tab has it.
 *
 * @param onHeld called once this tab has the name
 * @returns      gives the name back
 */
export function holdAlone(name: string, onHeld: () => void): () => void {
  const { locks } = navigator as { readonly locks?: LockManager };
  if (locks === undefined) {
    onHeld();
    return () => undefined;
  }
  const giveUp = new AbortController();
  let release = () => giveUp.abort();
  const held = () =>
    new Promise<void>((resolve) => {
      release = resolve;
      onHeld();
    });
  // Given up while waiting: there is nothing to do then.
  locks.request(name, { signal: giveUp.signal }, held).catch(() => undefined);
  return () => release();
}
