import type { NextFunction, Request, Response } from 'express';
import { ERROR_CATALOGUE, errorType } from '@eremite/shared/contracts/errors';

/**
 * What holds for every request to the API. Its answers are the data of a team and change with what others do, so that
 * no one may keep them. An ETag is the version of what may be changed, not of the whole answer (a survey's latest run is
 * none of its business), so that it can guard a change but never stand for "not modified".
 */
export function apiRequests(request: Request, response: Response, next: NextFunction): void {
  if (!/^\/api\/v1\//i.test(request.path)) return next();
  response.setHeader('Cache-Control', 'no-store');
  delete request.headers['if-none-match'];
  if (!/%00/.test(request.url)) return next();
  const problem = {
    type: errorType('VALIDATION_FAILED'),
    ...ERROR_CATALOGUE.VALIDATION_FAILED,
    detail: 'The character NUL (%00) has no place in an address.',
    instance: request.path,
  };
  response.status(400).type('application/problem+json').send(JSON.stringify(problem));
}
