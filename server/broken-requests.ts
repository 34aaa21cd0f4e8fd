import type { Server } from "node:http";
import type { Duplex } from "node:stream";
import { problemTable } from "./problems.ts";
import type { RequestErrorCode } from "./request-errors.ts";

/**
 * Answers what never becomes a request with a problem document as well: Node by itself would send a bare
 * status line, which tells a reader nothing.
 */
export function answerBrokenRequests(server: Server): void {
  server.on("clientError", (error: NodeJS.ErrnoException, socket) => {
    if (error.code === "ECONNRESET" || !socket.writable) socket.destroy();
    else refuse(socket, codeOf(error.code));
  });
  // Whatever a client expects besides 100-continue may be left unheard (RFC 9110, 10.1.1); Node would refuse it.
  server.on("checkExpectation", (request, response) => server.emit("request", request, response));
}

function codeOf(code: string | undefined): RequestErrorCode {
  if (code === "HPE_HEADER_OVERFLOW") return "headers-too-large";
  return code === "ERR_HTTP_REQUEST_TIMEOUT" ? "too-slow" : "malformed-request";
}

const reasons = { 400: "Bad Request", 408: "Request Timeout", 431: "Request Header Fields Too Large" } as const;

function refuse(socket: Duplex, code: RequestErrorCode): void {
  const { status, title } = problemTable[code];
  const body = JSON.stringify({ type: `/problems/${code}`, title, status });
  const head = [
    `HTTP/1.1 ${status} ${reasons[status as keyof typeof reasons]}`,
    "Content-Type: application/problem+json; charset=utf-8",
    `Content-Length: ${Buffer.byteLength(body)}`,
    "Cache-Control: no-store",
    "X-Content-Type-Options: nosniff",
    "Connection: close",
  ];
  socket.end(`${head.join("\r\n")}\r\n\r\n${body}`);
}
