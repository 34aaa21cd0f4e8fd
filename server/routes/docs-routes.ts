import { readFileSync } from "node:fs";
import { join } from "node:path";
import { Router } from "express";
import { projectFolder } from "../../db/project-folder.ts";
import { docsPage } from "../docs/docs-page.ts";
import { only } from "../methods.ts";
import { openApiDocument } from "../openapi/document.ts";

/** The API described, for programs and for people; made once, it changes only with the program. */
export function docsRoutes(): Router {
  const document = openApiDocument();
  const page = docsPage();
  const style = readFileSync(join(projectFolder(), "server", "docs", "docs.css"), "utf8");
  const router = Router();
  router
    .route("/openapi.json")
    .get((_request, response) => {
      response.json(document);
    })
    .all(only("GET"));
  router
    .route("/docs")
    .get((_request, response) => {
      response.type("html").send(page);
    })
    .all(only("GET"));
  router
    .route("/docs.css")
    .get((_request, response) => {
      response.type("css").send(style);
    })
    .all(only("GET"));
  return router;
}
