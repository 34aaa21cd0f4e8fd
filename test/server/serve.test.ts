import { connect } from "node:net";
import express from "express";
import { describe, expect, test } from "vitest";
import { serve } from "../../server/serve.ts";

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
});
