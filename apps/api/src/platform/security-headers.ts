import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * Headers that let our own pages run and nothing else. Style elements are allowed inline because PrimeReact writes some at run time;
 * scripts never are. Over plain http (the default on loopback) nothing is said about https.
 */
export function securityHeaders(publicUrl: string): RequestHandler {
  const isSecure = publicUrl.startsWith('https://');
  return helmet({
    strictTransportSecurity: isSecure,
    crossOriginOpenerPolicy: isSecure,
    originAgentCluster: isSecure,
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        baseUri: ["'self'"],
        connectSrc: ["'self'"],
        fontSrc: ["'self'", 'data:'],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        objectSrc: ["'none'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        workerSrc: ["'self'", 'blob:'],
        ...(isSecure && { upgradeInsecureRequests: [] }),
      },
    },
  });
}
