import { IncomingMessage, ServerResponse } from "node:http";
import { Socket } from "node:net";
import type { RequestHandler } from "express";
import helmet from "helmet";

const none = ["'none'"];
const self = ["'self'"];

/**
 * Security headers of every answer. The policy allows nothing but our own files: no inline script or
 * style, no other origin. upgrade-insecure-requests stays out: on a plain-HTTP loopback address it would
 * send the page's own files to https. HSTS only where a proxy really speaks TLS.
 * helmet says the same of every answer, so it is asked once.
 *
 * Source: OWASP ASVS 5.0.0, 3.4.1 to 3.4.8.
 */
export function securityHeaders(transport: "plain" | "behind-tls"): RequestHandler {
  const contentSecurityPolicy = {
    useDefaults: false,
    directives: {
      defaultSrc: none,
      scriptSrc: self,
      styleSrc: self,
      imgSrc: ["'self'", "data:"],
      fontSrc: self,
      connectSrc: self,
      formAction: self,
      baseUri: none,
      objectSrc: none,
      frameAncestors: none,
    },
  };
  const fixed = headersOf(
    helmet({
      contentSecurityPolicy,
      strictTransportSecurity: transport === "behind-tls" && { maxAge: 31_536_000, includeSubDomains: true },
      xFrameOptions: { action: "deny" },
    }),
  );
  fixed.push(["Permissions-Policy", "geolocation=(), camera=(), microphone=()"], ["Cache-Control", "no-store"]);
  return (_request, response, next) => {
    for (const [name, value] of fixed) response.setHeader(name, value);
    next();
  };
}

/** What a middleware sets on an answer that nobody gets. */
function headersOf(middleware: ReturnType<typeof helmet>): [name: string, value: string][] {
  const request = new IncomingMessage(new Socket());
  const response = new ServerResponse(request);
  let failed: unknown = new Error("helmet did not go on");
  middleware(request, response, (error) => {
    failed = error;
  });
  if (failed !== undefined) throw failed;
  return Object.entries(response.getHeaders()).map(([name, value]) => [name, String(value)]);
}
