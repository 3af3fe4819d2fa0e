import type { RequestHandler } from 'express';
import helmet from 'helmet';

export const CSP_REPORTS_PATH = '/api/csp-reports';

/** Headers of every answer: a content policy without anything inline, no referrer, HSTS only where the address is https. */
export function securityHeaders(publicUrl: string): RequestHandler {
  const isHttps = new URL(publicUrl).protocol === 'https:';
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        'style-src': ["'self'"],
        'img-src': ["'self'"],
        'font-src': ["'self'"],
        'connect-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'none'"],
        'form-action': ["'self'"],
        'frame-ancestors': ["'none'"],
        'report-uri': [CSP_REPORTS_PATH],
        ...(isHttps ? { 'upgrade-insecure-requests': [] } : {}),
      },
    },
    strictTransportSecurity: isHttps ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    referrerPolicy: { policy: 'no-referrer' },
    xFrameOptions: { action: 'deny' },
  });
}

/** Nothing of the API is kept by a browser or a proxy. */
export const neverStored: RequestHandler = (_request, response, next) => {
  response.set('Cache-Control', 'no-store');
  next();
};
