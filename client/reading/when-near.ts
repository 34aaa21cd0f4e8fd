/**
 * Calls once, as soon as an element is in view or less than a window's height away from it. A print counts
 * as in view.
 *
 * @returns stops waiting
 */
export function whenNear(element: Element, call: () => void): () => void {
  const stop = () => {
    observer.disconnect();
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
  return stop;
}
