import { connect } from "node:net";
import { performance } from "node:perf_hooks";

/**
 * Requests answered per second over some keep-alive connections, each of which asks again as soon as it
 * has been answered. Light on purpose: the server must be what is measured, so it reads no more of an
 * answer than its status and length.
 *
 * @returns { perSecond, busy }: busy is the share of the time this process was at work itself
 */
export async function requestsPerSecond(address, body, { connections = 16, seconds = 2 } = {}) {
  const { hostname, port } = new URL(address);
  const request = Buffer.from(
    `POST /api/predictions HTTP/1.1\r\nHost: ${hostname}:${port}\r\nContent-Type: application/json\r\nContent-Length: ${Buffer.byteLength(body)}\r\n\r\n${body}`,
  );
  const tally = { answered: 0, open: true };
  const before = performance.eventLoopUtilization();
  const beganMs = performance.now();
  const asking = Array.from({ length: connections }, () => askAgain(hostname, Number(port), request, tally));
  setTimeout(() => {
    tally.open = false;
  }, seconds * 1_000);
  await Promise.all(asking);
  const tookS = (performance.now() - beganMs) / 1_000;
  return { perSecond: tally.answered / tookS, busy: performance.eventLoopUtilization(before).utilization };
}

function askAgain(host, port, request, tally) {
  return new Promise((resolve, reject) => {
    const socket = connect({ host, port, noDelay: true }, () => socket.write(request));
    let left = 0;
    let head = "";
    socket.on("data", (bytes) => {
      if (left > 0) left -= bytes.length;
      else {
        head += bytes.latin1Slice(0, Math.min(bytes.length, 4096));
        const end = head.indexOf("\r\n\r\n");
        if (end < 0) return;
        if (!head.startsWith("HTTP/1.1 200")) {
          reject(new Error(`the server answered ${head.slice(0, 400)}`));
          socket.destroy();
          return;
        }
        left = end + 4 + Number(/\r\ncontent-length: (\d+)/i.exec(head)[1]) - bytes.length;
        head = "";
      }
      if (left > 0) return;
      tally.answered++;
      if (tally.open) socket.write(request);
      else socket.end(resolve);
    });
    socket.on("error", reject);
  });
}
