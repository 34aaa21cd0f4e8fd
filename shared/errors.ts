/**
 * A value at a public door is outside what the function can answer for.
 * The message names the parameter, what is allowed and what came, with no full stop.
 */
export class DomainError extends Error {
  readonly code = "domain" as const;
  readonly field: string;
  readonly value: unknown;
  readonly allowed: string;

  /**
   * @param field   path of the parameter, such as "durationH" or "doses/3/atH"
   * @param value   what came
   * @param allowed what is allowed, to follow "must be": "greater than 0"
   */
  constructor(field: string, value: unknown, allowed: string) {
    super(`${field} must be ${allowed}, got ${String(value)}`);
    this.name = "DomainError";
    this.field = field;
    this.value = value;
    this.allowed = allowed;
  }
}
