import { randomUUID } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { type LoggerService } from '@nestjs/common';
import { pino, type Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** Log of the service: one JSON object a line, without personal data. */
export function makeLogger(level: string): Logger {
  return pino({
    level,
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
    serializers: { err: loggedError },
    redact: { paths: ['*.password', '*.token', '*.email'], remove: true },
  });
}

/**
 * An error as the log shows it. The database layer puts the values of a failed query, which may be personal, into the
 * message; what the database itself said is the useful part.
 */
export function loggedError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { message: String(error) };
  const { query, cause } = error as Error & { query?: unknown };
  if (typeof query === 'string' && cause instanceof Error) {
    const { message, stack, code, constraint } = cause as Error & { code?: unknown; constraint?: unknown };
    return { type: error.name, message, stack, code, constraint, query };
  }
  return { type: error.name, message: error.message, stack: error.stack };
}

/** What Nest tells of its own start, line by line. */
const START_UP = new Set(['NestFactory', 'InstanceLoader', 'RoutesResolver', 'RouterExplorer', 'NestApplication']);

/** Nest's messages in the same log. */
export function nestLogger(logger: Logger): LoggerService {
  const write =
    (level: 'info' | 'error' | 'warn' | 'debug' | 'trace') =>
    (message: unknown, ...rest: unknown[]) => {
      const context = rest.findLast((part) => typeof part === 'string');
      if (level === 'info' && START_UP.has(context as string)) return logger.debug({ context }, String(message));
      if (typeof message === 'object' && message !== null) {
        const text = rest.find((part) => typeof part === 'string' && part !== context);
        return logger[level]({ ...message, context }, typeof text === 'string' ? text : undefined);
      }
      logger[level]({ context }, String(message));
    };
  return {
    log: write('info'),
    error: write('error'),
    warn: write('warn'),
    debug: write('debug'),
    verbose: write('trace'),
  };
}

/** A probe that asks before the server is ready gets an honest 503; that is no fault to wake anyone for. */
export function levelOf(request: IncomingMessage, response: ServerResponse, error?: Error): 'error' | 'info' | 'debug' {
  if (request.url?.split('?')[0]?.endsWith('/health/ready') && response.statusCode === 503) return 'debug';
  return error || response.statusCode >= 500 ? 'error' : response.statusCode >= 400 ? 'info' : 'debug';
}

/** One line a request: id, method, path without query, status, time. */
export function requestLog(logger: Logger) {
  return pinoHttp({
    logger,
    genReqId: (request: IncomingMessage, response: ServerResponse) => {
      const given = request.headers['x-request-id'];
      const id = typeof given === 'string' && /^[\w-]{8,64}$/.test(given) ? given : randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    serializers: {
      req: (request: { id: unknown; method: unknown; url: string }) => ({
        id: request.id,
        method: request.method,
        path: request.url.split('?')[0],
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
    customLogLevel: levelOf,
  });
}
