import { json, type Router } from 'express';
import { z } from 'zod';
import { depsOf } from './deps';
import { CSP_REPORTS_PATH } from './security-headers';

const reportSchema = z.object({
  'csp-report': z.object({
    'violated-directive': z.string().max(200),
    'blocked-uri': z.string().max(500),
    'source-file': z.string().max(500).optional(),
    'line-number': z.number().optional(),
  }),
});

/** Browsers report what the content policy stopped; the browser tests read the line in the log. */
export function bindCspReports(router: Router): void {
  let count = 0;
  const parse = json({ type: ['application/csp-report', 'application/json'], limit: '16kb' });
  router.post(CSP_REPORTS_PATH, parse, (request, response) => {
    const report = reportSchema.safeParse(request.body);
    count += 1;
    const found = report.success ? report.data['csp-report'] : 'unreadable';
    depsOf(request).log.warn({ count, report: found }, 'csp-report');
    response.status(204).end();
  });
}
