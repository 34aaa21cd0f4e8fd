/** By now the page is there and can be used, and what comes late holds nothing up. */
const atRestMs = 1_500;

/**
 * Calls once: as soon as an element is in view or less than a window's height away from it, before a print,
 * or when the page has been there for a while.
 *
 * @returns stops waiting
 */
export function whenNear(element: Element, call: () => void): () => void {
  const stop = () => {
    observer.disconnect();
    clearTimeout(later);
    removeEventListener("beforeprint", come);
  };
  const come = () => {
    stop();
    call();
  };
  const observer = new IntersectionObserver(
    (entries) => entries.some(({ isIntersecting }) => isIntersecting) && come(),
    {
      rootMargin: "100% 0px",
    },
  );
  observer.observe(element);
  addEventListener("beforeprint", come);
  const later = setTimeout(come, atRestMs);
  return stop;
}
