/** Something that is asked for is not there. */
export class NotFoundError extends Error {
  readonly code = "not-found" as const;
  readonly noun: string;

  constructor(noun: string) {
    super(`there is no ${noun} with this id`);
    this.name = "NotFoundError";
    this.noun = noun;
  }
}

/** Somebody else saved in between: what the writer had seen is no longer the newest. */
export class StaleError extends Error {
  readonly code = "stale" as const;

  constructor(noun: string, seen: number, newest: number) {
    super(`the ${noun} has changed: you had seen ${seen}, the newest is ${newest}`);
    this.name = "StaleError";
  }
}

/** A case holds no more alternatives than can be told apart side by side. */
export class TooManyAlternativesError extends Error {
  readonly code = "too-many-alternatives" as const;

  constructor(most: number) {
    super(`a case holds at most ${most} alternatives that are not retired`);
    this.name = "TooManyAlternativesError";
  }
}

/** One idempotency key came with two different requests. */
export class KeyReusedError extends Error {
  readonly code = "key-reused" as const;

  constructor() {
    super("this Idempotency-Key was used for another request");
    this.name = "KeyReusedError";
  }
}

/** A stored row is not what was stored: nothing is computed or printed from it. */
export class AlteredRowError extends Error {
  readonly code = "altered" as const;

  /** @param row which row, by noun and id or number, never its contents */
  constructor(row: string) {
    super(`${row} is not as it was stored; restore the database from a backup`);
    this.name = "AlteredRowError";
  }
}

/** The database file was deleted, moved or replaced while it was open: what is written now would be lost. */
export class DatabaseGoneError extends Error {
  readonly code = "database-gone" as const;

  constructor() {
    super("put the database file back where it was, then start the program again");
    this.name = "DatabaseGoneError";
  }
}
