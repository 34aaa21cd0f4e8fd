import pino, { type DestinationStream, type Logger } from "pino";

/**
 * Structured log on standard error, one JSON line an event, in UTC. Standard output is kept for the one
 * line with the address. What is logged is chosen field by field; nothing that a user typed is.
 */
export function makeLogger(
  level: string,
  destination: DestinationStream = pino.destination({ dest: 2, sync: true }),
): Logger {
  return pino({ level, base: { program: "ebbline" }, timestamp: pino.stdTimeFunctions.isoTime }, destination);
}
