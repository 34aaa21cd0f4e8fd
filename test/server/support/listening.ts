import { once } from "node:events";
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import type { Express } from "express";
import { onTestFinished } from "vitest";

/** The app on a port of its own, until the test is over. */
export async function listening(app: Express): Promise<{ readonly server: Server; readonly port: number }> {
  const server = createServer(app).listen(0, "127.0.0.1");
  await once(server, "listening");
  onTestFinished(() => {
    server.close();
    server.closeAllConnections();
  });
  return { server, port: (server.address() as AddressInfo).port };
}
