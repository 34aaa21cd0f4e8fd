import type { IncomingMessage, ServerResponse } from "node:http";

const mostBytes = 32 * 1024 * 1024;
const mostMs = 2_000;

/**
 * Reads a request to its end and throws it away, so that a refusal reaches a sender that is still
 * sending. A sender that goes on for too long gets the answer at once and the connection is closed.
 */
export async function drain(request: IncomingMessage, response: ServerResponse): Promise<void> {
  if (request.complete || request.destroyed) return;
  const ended = await new Promise<boolean>((resolve) => {
    const timer = setTimeout(() => resolve(false), mostMs);
    let bytes = 0;
    request.on("data", (chunk: Buffer) => {
      bytes += chunk.length;
      if (bytes > mostBytes) resolve(false);
    });
    for (const event of ["end", "close", "error"])
      request.once(event, () => {
        clearTimeout(timer);
        resolve(true);
      });
    request.resume();
  });
  if (!ended) response.setHeader("Connection", "close");
}
