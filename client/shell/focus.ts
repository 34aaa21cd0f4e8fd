/** Moves the focus once the page has been drawn anew; to a heading or a status it goes without a stop for Tab. */
export function focusOn(id: string): void {
  requestAnimationFrame(() => {
    const found = document.getElementById(id);
    if (found === null) return;
    if (found.tabIndex < 0 && !found.hasAttribute("tabindex")) found.setAttribute("tabindex", "-1");
    found.focus();
  });
}
