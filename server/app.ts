import express, { type Express, Router } from "express";
import type { AppNeeds } from "./app-needs.ts";
import { clientFiles } from "./client-files.ts";
import { noSuchAddress, problemHandler } from "./problems.ts";
import { requestIds } from "./request-id.ts";
import { requestLimit } from "./request-limit.ts";
import { requestLog } from "./request-log.ts";
import { caseFileRoutes } from "./routes/case-file-routes.ts";
import { caseRoutes } from "./routes/case-routes.ts";
import { docsRoutes } from "./routes/docs-routes.ts";
import { healthRoutes } from "./routes/health-routes.ts";
import { predictionRoutes } from "./routes/prediction-routes.ts";
import { regimenRoutes } from "./routes/regimen-routes.ts";
import { revisionRoutes } from "./routes/revision-routes.ts";
import { securityHeaders } from "./security/headers.ts";
import { hostCheck } from "./security/host-check.ts";
import { readablePath } from "./security/readable-path.ts";
import { sameOriginWrites } from "./security/same-origin.ts";

/** The whole server, not listening yet. Who may ask comes before what is asked. */
export function createApp(needs: AppNeeds): Express {
  const { settings, logger, clientFolder } = needs;
  const app = express();
  app.disable("x-powered-by");
  app.disable("etag");
  app.set("query parser", "simple");
  app.set("trust proxy", false);
  app.use(requestIds(needs.ids), requestLog(logger), securityHeaders(settings.transport));
  app.use(hostCheck([settings.host, ...settings.publicNames]), readablePath);
  const api = Router();
  api.use(requestLimit(settings.requestsPerMinute), sameOriginWrites, ...apiRouters(needs));
  app.use("/api", api);
  if (clientFolder !== undefined) app.use(clientFiles(clientFolder));
  app.use(noSuchAddress);
  app.use(problemHandler(logger, needs.giveUp));
  return app;
}

/** One router a noun. */
export function apiRouters(needs: AppNeeds): Router[] {
  return [
    predictionRoutes(needs),
    caseRoutes(needs),
    caseFileRoutes(needs),
    regimenRoutes(needs),
    revisionRoutes(needs),
    docsRoutes(),
    healthRoutes({ stores: needs.stores, nowMs: () => Date.parse(needs.clock()) }),
  ];
}
