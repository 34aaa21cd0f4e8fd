import { homedir } from "node:os";
import { join } from "node:path";
import { z } from "zod";

const loopback = /^(localhost|127(\.\d{1,3}){3}|::1)$/;
const yes = z.literal("yes", { error: 'must be "yes" or left out' }).optional();

const port = z
  .string()
  .regex(/^\d{1,5}$/, { error: "must be a port number from 0 to 65535" })
  .transform(Number)
  .pipe(z.number().max(65_535, { error: "must be a port number from 0 to 65535" }));

const Environment = z.object({
  PORT: port.default(7317),
  HOST: z
    .string()
    .regex(/^[A-Za-z0-9.:_-]+$/, { error: "must be a host name or an address" })
    .default("127.0.0.1"),
  EBBLINE_DATABASE: z
    .string()
    .min(1, { error: "must be the path of a file" })
    // To the driver this is a database in memory: everything saved would be gone with the program.
    .refine((path) => path.trim() !== ":memory:", { error: "must be the path of a file that stays" })
    .optional(),
  EBBLINE_LOG_LEVEL: z
    .enum(["fatal", "error", "warn", "info", "debug", "trace", "silent"], {
      error: "must be fatal, error, warn, info, debug, trace or silent",
    })
    .default("info"),
  EBBLINE_BEHIND_TLS: yes,
  EBBLINE_PUBLIC_NAMES: z
    .string()
    .regex(/^[A-Za-z0-9.-]+(,[A-Za-z0-9.-]+)*$/, { error: "must be host names with commas between them" })
    .optional(),
  EBBLINE_REQUESTS_PER_MINUTE: z
    .string()
    .regex(/^[1-9]\d{0,8}$/, { error: "must be a whole number above 0" })
    .transform(Number)
    .default(6_000),
});

export interface Settings {
  readonly port: number;
  readonly host: string;
  readonly database: string;
  readonly logLevel: string;
  /** A proxy in front speaks TLS: browsers reach this server by https only. */
  readonly transport: "plain" | "behind-tls";
  /** Names in the Host header that are meant for this server, besides loopback and `host`. */
  readonly publicNames: readonly string[];
  readonly requestsPerMinute: number;
}

/** A setting in the environment cannot be used. */
export class SettingsError extends Error {
  readonly code = "settings" as const;

  constructor(problems: readonly string[]) {
    super(problems.join("\n"));
    this.name = "SettingsError";
  }
}

/**
 * Settings from the environment.
 *
 * @throws {SettingsError} naming each variable that cannot be used and what is allowed
 */
export function readSettings(
  environment: Readonly<Record<string, string | undefined>>,
  platform: NodeJS.Platform,
): Settings {
  const read = Environment.safeParse(environment);
  if (!read.success)
    throw new SettingsError(
      read.error.issues.map(
        ({ path, message }) => `${path.join(".")} ${message}, got "${environment[String(path[0])]}"`,
      ),
    );
  const { HOST: host, EBBLINE_BEHIND_TLS: behindTls } = read.data;
  // Doses and levels in plain text on a network can be read and changed on the way.
  if (!loopback.test(host) && behindTls !== "yes")
    throw new SettingsError([
      `HOST "${host}" can be reached from other machines: allowed only behind a proxy that speaks TLS, with EBBLINE_BEHIND_TLS=yes`,
    ]);
  return {
    port: read.data.PORT,
    host,
    database: read.data.EBBLINE_DATABASE ?? join(dataFolder(environment, platform), "ebbline.sqlite"),
    logLevel: read.data.EBBLINE_LOG_LEVEL,
    transport: behindTls === "yes" ? "behind-tls" : "plain",
    publicNames: read.data.EBBLINE_PUBLIC_NAMES?.toLowerCase().split(",") ?? [],
    requestsPerMinute: read.data.EBBLINE_REQUESTS_PER_MINUTE,
  };
}

/** Where each platform keeps a user's data (XDG Base Directory on Linux). */
function dataFolder(environment: Readonly<Record<string, string | undefined>>, platform: NodeJS.Platform): string {
  const home = environment["HOME"] || homedir();
  if (platform === "win32") return join(environment["LOCALAPPDATA"] || join(homedir(), "AppData", "Local"), "Ebbline");
  if (platform === "darwin") return join(home, "Library", "Application Support", "Ebbline");
  return join(environment["XDG_DATA_HOME"] || join(home, ".local", "share"), "ebbline");
}
