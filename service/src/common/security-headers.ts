import helmet from 'helmet';

/**
 * Content policy and the like. Only this origin; inline styles are allowed, which the map and the charts set on their
 * elements; images may be drawn by the page itself.
 *
 * @param https whether the installation is reached by https; only then are browsers told to insist on it
 */
export function securityHeaders(https: boolean) {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        baseUri: ["'self'"],
        connectSrc: ["'self'"],
        fontSrc: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        objectSrc: ["'none'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        workerSrc: ["'self'", 'blob:'],
        ...(https && { upgradeInsecureRequests: [] }),
      },
    },
    strictTransportSecurity: https && { maxAge: 31_536_000 },
    // Without https these two would only make browsers complain.
    crossOriginOpenerPolicy: https,
    originAgentCluster: https,
    referrerPolicy: { policy: 'same-origin' },
  });
}
