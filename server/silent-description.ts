/** What may be logged of an error: its kind and where it came from. Its message may hold what somebody typed. */
export interface SilentDescription {
  readonly name: string;
  readonly code?: string;
  readonly frames: readonly string[];
}

/** An error of another thread, of which only this much came over. */
export class DescribedError extends Error {
  readonly description: SilentDescription;

  constructor(message: string, description: SilentDescription) {
    super(message);
    this.name = "DescribedError";
    this.description = description;
  }
}

export function silentDescription(error: unknown): SilentDescription {
  if (error instanceof DescribedError) return error.description;
  if (!(error instanceof Error)) return { name: typeof error, frames: [] };
  const code = "code" in error && /^[A-Za-z0-9_-]{1,40}$/.test(String(error.code)) ? { code: String(error.code) } : {};
  return { name: error.constructor.name, ...code, frames: framesOf(error) };
}

/** A message may run over several lines, one of which may look like a frame: cut it off whole or log no frames. */
function framesOf({ stack = "", message }: Error): string[] {
  const end = stack.indexOf(message);
  const rest = end < 0 ? "" : stack.slice(end + message.length);
  if (message !== "" && rest.includes(message)) return [];
  return rest
    .split("\n")
    .map((line) => line.trim())
    .filter((line) => line.startsWith("at "))
    .slice(0, 12);
}
