import { join } from "node:path";
import express, { Router } from "express";
import { only } from "./methods.ts";

/**
 * The built page: its files, and the page itself at each address that the page knows how to show. Files
 * in assets/ carry their hash in their name and never change.
 */
export function clientFiles(folder: string): Router {
  const router = Router();
  router
    .route(["/", "/cases/:caseId"])
    // With a root, so that a folder of the path above it may begin with a dot, as .build does.
    .get((_request, response) =>
      response.sendFile("index.html", { root: folder, cacheControl: false, etag: false, lastModified: false }),
    )
    .all(only("GET"));
  router.use(
    express.static(folder, {
      index: false,
      redirect: false,
      cacheControl: false,
      setHeaders(response, path) {
        if (path.startsWith(join(folder, "assets")))
          response.setHeader("Cache-Control", "public, max-age=31536000, immutable");
      },
    }),
  );
  return router;
}
