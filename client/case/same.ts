/** Whether two plain data structures say the same, whatever order their fields were written in. */
export function same(one: unknown, other: unknown): boolean {
  if (Object.is(one, other)) return true;
  if (typeof one !== "object" || typeof other !== "object" || one === null || other === null) return false;
  if (Array.isArray(one) !== Array.isArray(other)) return false;
  const names = Object.keys(one);
  if (names.length !== Object.keys(other).length) return false;
  return names.every(
    (name) => Object.hasOwn(other, name) && same(one[name as keyof typeof one], other[name as keyof typeof other]),
  );
}
