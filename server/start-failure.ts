import { DatabaseRefused } from "../db/database-refused.ts";
import { SettingsError } from "./settings.ts";

/** Why the server did not start, in one sentence that says what to do; anything unknown as it is. */
export function sayWhyNotStarted(error: unknown): string {
  if (error instanceof SettingsError) return `Ebbline cannot start with these settings:\n${error.message}`;
  if (error instanceof DatabaseRefused)
    return `Ebbline cannot use its database file (EBBLINE_DATABASE): ${error.message}`;
  if (!(error instanceof Error)) return `Ebbline cannot start: ${String(error)}`;
  const code = "code" in error ? error.code : undefined;
  if (code === "EADDRINUSE")
    return "Ebbline cannot start: the port is taken by another program. Stop that one, or set PORT to another number.";
  if (code === "EACCES" || code === "EADDRNOTAVAIL")
    return `Ebbline cannot start: HOST and PORT cannot be listened on here (${code}).`;
  return `Ebbline cannot start: ${error.stack ?? error.message}`;
}
