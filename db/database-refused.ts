/** Why a file cannot be used as our database. */
export type RefusalReason = "damaged" | "foreign" | "newer" | "migrations" | "settings" | "unreachable";

/** The database file is refused as a whole: nothing is served from it and nothing is written to it. */
export class DatabaseRefused extends Error {
  readonly code = "database-refused" as const;
  readonly reason: RefusalReason;

  /** @param message what is wrong with the file and what can be done, without any of its contents */
  constructor(reason: RefusalReason, message: string, options?: ErrorOptions) {
    super(message, options);
    this.name = "DatabaseRefused";
    this.reason = reason;
  }
}
