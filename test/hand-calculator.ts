/**
 * What a colleague's calculator makes of a printed line: numbers, + − × ÷, brackets and e^( ), all units
 * passed over. It knows nothing of the program.
 *
 * @throws {Error} on a sign that no calculator line has
 */
export function handCalculator(line: string): number {
  const signs = line
    .replaceAll("\u00a0", " ")
    .replace(/(?<=\d),(?=\d{3})/g, "")
    .replace(/\b(mg·h\/L|mg\/L|L\/h|mg per hour|per h|percent|mg|L|h)\b/g, "")
    .match(/\d+(?:\.\d+)?|e\^|[+−×÷()[\]]|\S/g);
  let at = 0;
  const next = () => signs?.[at];
  const take = () => signs![at++]!;

  const sum = (): number => {
    let total = product();
    while (next() === "+" || next() === "−") total = take() === "+" ? total + product() : total - product();
    return total;
  };
  const product = (): number => {
    let total = factor();
    while (next() === "×" || next() === "÷") total = take() === "×" ? total * factor() : total / factor();
    return total;
  };
  const factor = (): number => {
    const sign = take();
    if (sign === "−") return -factor();
    if (sign === "e^") return Math.exp(factor());
    if (sign === "(" || sign === "[") {
      const inner = sum();
      if (!/[)\]]/.test(take())) throw new Error(`a bracket is left open in ${line}`);
      return inner;
    }
    if (!/^\d/.test(sign)) throw new Error(`${sign} is on no calculator: ${line}`);
    return Number(sign);
  };
  const result = sum();
  if (next() !== undefined) throw new Error(`${next()} is left over in ${line}`);
  return result;
}
