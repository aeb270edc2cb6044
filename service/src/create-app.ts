import { errorType, ERROR_CATALOGUE } from '@eremite/shared/contracts/errors';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import cookieParser from 'cookie-parser';
import type { NextFunction, Request, Response } from 'express';
import type { IncomingMessage } from 'node:http';
import { AppModule } from './app.module.ts';
import { apiRequests } from './common/api-requests.ts';
import { guardJson } from './common/json-guard.ts';
import { serveOpenApi } from './common/openapi.ts';
import { Readiness } from './common/readiness.ts';
import { makeLogger, nestLogger, requestLog } from './common/request-log.ts';
import { securityHeaders } from './common/security-headers.ts';
import type { Env } from './config/env.ts';
import { RequestCounts } from './modules/health/request-counts.ts';

/** The whole application, set up but not listening. */
export async function createApp(env: Env): Promise<NestExpressApplication> {
  const logger = makeLogger(env.logLevel);
  const app = await NestFactory.create<NestExpressApplication>(AppModule.register(env), {
    logger: nestLogger(logger),
    abortOnError: false,
    bodyParser: false,
    forceCloseConnections: true,
  });
  app.set('trust proxy', env.trustProxy);
  app.disable('x-powered-by');
  app.set('query parser', 'simple');
  // ETags are versions here, set where a change can collide.
  app.set('etag', false);
  app.use(requestLog(logger));
  app.use(app.get(RequestCounts, { strict: false }).middleware);
  app.use(securityHeaders(env.publicUrl?.startsWith('https:') ?? false));
  // Probes and scrapers ask outside the API's own path.
  app.use((request: Request, _response: Response, next: NextFunction) => {
    if (/^\/(health\/(live|ready)|metrics)(\?|$)/.test(request.url)) request.url = `/api/v1${request.url}`;
    next();
  });
  app.use(apiRequests);
  app.use(untilReady(app.get(Readiness, { strict: false })));
  app.use(cookieParser());
  const verify = (_request: IncomingMessage, _response: unknown, body: Buffer): void => guardJson(body);
  // JSON only: a form another site sends on its visitor's behalf is not read. The type does not know `verify`.
  app.useBodyParser('json', { limit: '5mb', verify } as object);
  app.setGlobalPrefix('api/v1');
  serveOpenApi(app);
  return app;
}

/** While the demo is made, only the probes answer. */
function untilReady(readiness: Readiness) {
  return (request: Request, response: Response, next: NextFunction) => {
    const probe = request.path.startsWith('/api/v1/health/');
    if (readiness.ready || probe || !request.path.startsWith('/api/')) return next();
    const problem = { type: errorType('STARTING'), ...ERROR_CATALOGUE.STARTING, detail: readiness.doing };
    response.setHeader('Retry-After', '2');
    response.status(503).type('application/problem+json').send(JSON.stringify(problem));
  };
}
