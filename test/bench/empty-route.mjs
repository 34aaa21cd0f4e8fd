import express from "express";

/** The least an Express server can do: one route that answers a fixed text of a given length. Prints its address. */
const body = `"${"x".repeat(Number(process.argv[2]) - 2)}"`;
const app = express();
app.disable("x-powered-by");
app.disable("etag");
app.post("/api/predictions", (_, response) => {
  response.type("json").send(body);
});
const server = app.listen(0, "127.0.0.1", () =>
  process.stdout.write(`ready at http://127.0.0.1:${server.address().port}\n`),
);
