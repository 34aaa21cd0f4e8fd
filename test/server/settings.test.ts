import { homedir } from "node:os";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { readSettings } from "../../server/settings.ts";

describe("readSettings", () => {
  test("has a default for each", () => {
    expect(readSettings({ HOME: "/home/a" }, "linux")).toEqual({
      port: 7317,
      host: "127.0.0.1",
      database: "/home/a/.local/share/ebbline/ebbline.sqlite",
      logLevel: "info",
      transport: "plain",
      publicNames: [],
      requestsPerMinute: 6_000,
    });
  });

  test.for([
    {
      platform: "linux",
      environment: { XDG_DATA_HOME: "/data", HOME: "/home/a" },
      file: "/data/ebbline/ebbline.sqlite",
    },
    {
      platform: "darwin",
      environment: { HOME: "/Users/a" },
      file: "/Users/a/Library/Application Support/Ebbline/ebbline.sqlite",
    },
    { platform: "win32", environment: { LOCALAPPDATA: "/AppData" }, file: "/AppData/Ebbline/ebbline.sqlite" },
    { platform: "linux", environment: { HOME: "" }, file: join(homedir(), ".local/share/ebbline/ebbline.sqlite") },
    { platform: "linux", environment: { EBBLINE_DATABASE: "/srv/own.sqlite" }, file: "/srv/own.sqlite" },
  ] as const)("keeps data where $platform has them", ({ platform, environment, file }) => {
    expect(readSettings(environment, platform).database).toBe(file);
  });

  test.for([
    { environment: { PORT: "http" }, message: 'PORT must be a port number from 0 to 65535, got "http"' },
    { environment: { PORT: "65536" }, message: 'PORT must be a port number from 0 to 65535, got "65536"' },
    { environment: { PORT: "-1" }, message: 'PORT must be a port number from 0 to 65535, got "-1"' },
    {
      environment: { EBBLINE_LOG_LEVEL: "loud" },
      message: 'EBBLINE_LOG_LEVEL must be fatal, error, warn, info, debug, trace or silent, got "loud"',
    },
    {
      environment: { EBBLINE_DATABASE: ":memory:" },
      message: 'EBBLINE_DATABASE must be the path of a file that stays, got ":memory:"',
    },
    { environment: { EBBLINE_DATABASE: "" }, message: 'EBBLINE_DATABASE must be the path of a file, got ""' },
    {
      environment: { EBBLINE_BEHIND_TLS: "true" },
      message: 'EBBLINE_BEHIND_TLS must be "yes" or left out, got "true"',
    },
    {
      environment: { EBBLINE_REQUESTS_PER_MINUTE: "0" },
      message: 'EBBLINE_REQUESTS_PER_MINUTE must be a whole number above 0, got "0"',
    },
    { environment: { HOST: "a b" }, message: 'HOST must be a host name or an address, got "a b"' },
  ])("refuses $environment", ({ environment, message }) => {
    expect(() => readSettings(environment, "linux")).toThrow(message);
  });

  test.for(["0.0.0.0", "192.168.1.5", "::", "plan.example"])(
    "refuses to be reached from other machines at %s without TLS in front",
    (HOST) => {
      expect(() => readSettings({ HOST }, "linux")).toThrow("EBBLINE_BEHIND_TLS=yes");
      expect(
        readSettings({ HOST, EBBLINE_BEHIND_TLS: "yes", EBBLINE_PUBLIC_NAMES: "Plan.example,b.example" }, "linux"),
      ).toMatchObject({
        host: HOST,
        transport: "behind-tls",
        publicNames: ["plan.example", "b.example"],
      });
    },
  );

  test.for(["localhost", "127.0.0.1", "127.1.2.3", "::1"])("takes the loopback address %s", (HOST) => {
    expect(readSettings({ HOST }, "linux").host).toBe(HOST);
  });
});
