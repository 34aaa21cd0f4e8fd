import type { IncomingMessage } from "node:http";
import { RequestError } from "./request-errors.ts";

/**
 * The bytes of a body, of at most so many. What is beyond is left unread, for the refusal to drain.
 *
 * @throws {RequestError} if it is longer, or its sender goes away before its end
 */
export function readBody(request: IncomingMessage, mostBytes: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    if (Number(request.headers["content-length"] ?? 0) > mostBytes) return reject(tooLarge());
    const chunks: Buffer[] = [];
    let bytes = 0;
    const onData = (chunk: Buffer) => {
      bytes += chunk.length;
      chunks.push(chunk);
      if (bytes > mostBytes) done(tooLarge());
    };
    const onEnd = () => done(undefined);
    const onLost = () => done(new RequestError("malformed-json", "the body ends early"));
    const done = (error: RequestError | undefined) => {
      request.off("data", onData).off("end", onEnd).off("close", onLost).off("error", onLost);
      if (error !== undefined) reject(error);
      else resolve(chunks.length === 1 ? chunks[0]! : Buffer.concat(chunks));
    };
    request.on("data", onData).on("end", onEnd).on("close", onLost).on("error", onLost);
  });
}

function tooLarge(): RequestError {
  return new RequestError("too-large", "send less at once; the limits are listed at /api/docs");
}
