import { connect, type Socket } from "node:net";
import express from "express";
import { describe, expect, onTestFinished, test } from "vitest";
import { serve } from "../../server/serve.ts";
import { Problem } from "../../shared/contract/problem.ts";

describe("serve", () => {
  test("rejects where the port is taken, and does not take that for success", async () => {
    const first = await serve(express(), { port: 0, host: "127.0.0.1" });
    const port = Number(new URL(first.address).port);
    await expect(serve(express(), { port, host: "127.0.0.1" })).rejects.toMatchObject({ code: "EADDRINUSE" });
    await first.stop();
  });

  test("says an IPv6 address so that a browser can read it", async () => {
    const serving = await serve(express(), { port: 0, host: "::1" });
    expect(serving.address).toMatch(/^http:\/\/\[::1\]:\d+$/);
    await serving.stop();
  });

  test("lets a request finish that has begun", async () => {
    const app = express();
    app.get("/slow", (_request, response) => void setTimeout(() => response.send("done"), 200));
    const serving = await serve(app, { port: 0, host: "127.0.0.1" });
    const slow = fetch(`${serving.address}/slow`).then((answer) => answer.text());
    await new Promise((resolve) => setTimeout(resolve, 50));
    await serving.stop();
    expect(await slow).toBe("done");
  });

  test("stops although a sender never ends its request", async () => {
    const app = express();
    app.use(express.json());
    const serving = await serve(app, { port: 0, host: "127.0.0.1", patienceMs: 200 });
    const socket = connect(Number(new URL(serving.address).port), "127.0.0.1");
    const closed = new Promise((resolve) => socket.on("error", resolve).on("close", resolve));
    socket.write("POST / HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nContent-Length: 100\r\n\r\n{");
    await new Promise((resolve) => setTimeout(resolve, 50));
    await serving.stop();
    await closed;
  });

  test.for([
    { name: "is no HTTP", sent: "GARBAGE\r\n\r\n", type: "malformed-request", status: 400 },
    {
      name: "has two lengths",
      sent: "POST / HTTP/1.1\r\nHost: x\r\nContent-Length: 1\r\nTransfer-Encoding: chunked\r\n\r\n",
      type: "malformed-request",
      status: 400,
    },
    {
      name: "has a header without end",
      sent: `GET / HTTP/1.1\r\nHost: x\r\nX: ${"x".repeat(20_000)}`,
      type: "headers-too-large",
      status: 431,
    },
  ])("answers what $name with a problem document", async ({ sent, type, status }) => {
    const serving = await serve(express(), { port: 0, host: "127.0.0.1" });
    onTestFinished(serving.stop);
    const [head, body] = (await saidTo(serving.address, sent)).split("\r\n\r\n");
    expect(head).toMatch(
      new RegExp(`^HTTP/1\\.1 ${status} .*\r\nContent-Type: application/problem\\+json; charset=utf-8\r\n`),
    );
    expect(Problem.parse(JSON.parse(body!))).toMatchObject({ type: `/problems/${type}`, status });
  });

  test("leaves a missing Host header and an unknown expectation to the app", async () => {
    const app = express();
    app.use((_request, response) => void response.set("Connection", "close").send("the app"));
    const serving = await serve(app, { port: 0, host: "127.0.0.1" });
    onTestFinished(serving.stop);
    expect(await saidTo(serving.address, "GET / HTTP/1.1\r\n\r\n")).toContain("the app");
    expect(await saidTo(serving.address, "GET / HTTP/1.1\r\nHost: x\r\nExpect: x\r\n\r\n")).toContain("the app");
  });
});

/** What a server answers to some bytes until it closes the connection. */
function saidTo(address: string, sent: string): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = "";
    connect(Number(new URL(address).port), "127.0.0.1", function (this: Socket) {
      this.write(sent);
    })
      .on("data", (bytes) => {
        said += String(bytes);
      })
      .on("close", () => resolve(said))
      .on("error", reject);
  });
}
