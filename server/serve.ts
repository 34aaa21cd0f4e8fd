import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import type { Express } from "express";
import { answerBrokenRequests } from "./broken-requests.ts";

/** The server listens and can be stopped. */
export interface Serving {
  readonly address: string;
  /** Stops accepting, lets what is running finish for a while, then resolves. */
  stop(): Promise<void>;
}

/**
 * Listens, or rejects with the error of listening: Express's own callback is also called with an error,
 * which is easily taken for success.
 *
 * @param patienceMs how long a request may go on once the server is to stop
 */
export async function serve(
  app: Express,
  { port, host, patienceMs = 15_000 }: { readonly port: number; readonly host: string; readonly patienceMs?: number },
): Promise<Serving> {
  // A missing Host header is refused by the app, with a problem document.
  const server = createServer({ requestTimeout: 60_000, headersTimeout: 20_000, requireHostHeader: false }, app);
  answerBrokenRequests(server);
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, host, resolve);
  });
  const { address, port: taken } = server.address() as AddressInfo;
  return {
    address: `http://${address.includes(":") ? `[${address}]` : address}:${taken}`,
    stop: () => stopped(server, patienceMs),
  };
}

function stopped(server: Server, patienceMs: number): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve());
    // Connections kept alive would hold the server open; those with a request running are not idle.
    server.closeIdleConnections();
    const sweep = setInterval(() => server.closeIdleConnections(), 100).unref();
    // A sender that never ends its request must not keep a server from being stopped.
    const end = setTimeout(() => server.closeAllConnections(), patienceMs);
    server.once("close", () => {
      clearInterval(sweep);
      clearTimeout(end);
    });
  });
}
