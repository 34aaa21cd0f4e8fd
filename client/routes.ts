import { computed, signal } from "@preact/signals";

export type Route =
  | { readonly page: "cases" }
  | { readonly page: "case"; readonly id: string }
  | { readonly page: "nowhere" };

const path = signal(location.pathname);

/** Where the reader is. */
export const route = computed<Route>(() => routeOf(path.value));

addEventListener("popstate", () => {
  path.value = location.pathname;
});

/** Goes to another page of the program without loading it anew. */
export function goTo(target: string): void {
  history.pushState(null, "", target);
  path.value = location.pathname;
  scrollTo(0, 0);
  // A reader of the page by ear is told nothing unless the focus goes along.
  requestAnimationFrame(() => document.getElementById("main")?.focus({ preventScroll: true }));
}

/** For links within the program; a click meant for a new tab or window stays the browser's own. */
export function followHere(event: MouseEvent): void {
  if (event.button !== 0 || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey) return;
  const target = event.currentTarget;
  if (!(target instanceof HTMLAnchorElement)) return;
  event.preventDefault();
  goTo(target.pathname);
}

function routeOf(pathname: string): Route {
  if (pathname === "/") return { page: "cases" };
  const [, id] = /^\/cases\/([0-9a-f-]{36})$/.exec(pathname) ?? [];
  return id === undefined ? { page: "nowhere" } : { page: "case", id };
}
