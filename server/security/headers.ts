import type { RequestHandler } from "express";
import helmet from "helmet";

const none = ["'none'"];
const self = ["'self'"];

/**
 * Security headers of every answer. The policy allows nothing but our own files: no inline script or
 * style, no other origin. upgrade-insecure-requests stays out: on a plain-HTTP loopback address it would
 * send the page's own files to https. HSTS only where a proxy really speaks TLS.
 *
 * Source: OWASP ASVS 5.0.0, 3.4.1 to 3.4.8.
 */
export function securityHeaders(transport: "plain" | "behind-tls"): RequestHandler[] {
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
  return [
    helmet({
      contentSecurityPolicy,
      strictTransportSecurity: transport === "behind-tls" && { maxAge: 31_536_000, includeSubDomains: true },
      xFrameOptions: { action: "deny" },
    }),
    (_request, response, next) => {
      response.set({ "Permissions-Policy": "geolocation=(), camera=(), microphone=()", "Cache-Control": "no-store" });
      next();
    },
  ];
}
