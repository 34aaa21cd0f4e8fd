/**
 * Moves the focus once the page has been drawn anew: to the first of these that is there then. To a
 * heading or a status it goes without a stop for Tab.
 */
export function focusOn(...ids: readonly string[]): void {
  requestAnimationFrame(() => {
    const found = ids.map((id) => document.getElementById(id)).find((element) => element !== null);
    if (found === undefined) return;
    if (found.tabIndex < 0 && !found.hasAttribute("tabindex")) found.setAttribute("tabindex", "-1");
    found.focus();
  });
}
