import { ERROR_CATALOGUE, type ErrorCode, errorType } from '@eremite/shared/contracts/errors';
import type { Problem } from '@eremite/shared/contracts/problem';
import { type ArgumentsHost, Catch, type ExceptionFilter, HttpException, Logger } from '@nestjs/common';
import type { Response } from 'express';
import { AppError } from './app-error.ts';
import type { SignedInRequest } from './signed-in-user.ts';

/** Errors the framework raises itself, by their status. */
const BY_STATUS: Record<number, ErrorCode> = {
  400: 'VALIDATION_FAILED',
  401: 'NOT_SIGNED_IN',
  403: 'NOT_ALLOWED',
  404: 'NOT_FOUND',
  413: 'TOO_LARGE',
  415: 'VALIDATION_FAILED',
  429: 'TOO_MANY_REQUESTS',
};

/** The one way errors leave: RFC 9457, never a stack; what was not foreseen is logged and answered with INTERNAL. */
@Catch()
export class ProblemFilter implements ExceptionFilter {
  readonly #log = new Logger(ProblemFilter.name);

  catch(error: unknown, host: ArgumentsHost): void {
    const http = host.switchToHttp();
    const request = http.getRequest<SignedInRequest>();
    const response = http.getResponse<Response>();
    const problem = toProblem(error);
    if (problem.status >= 500) this.#log.error({ err: error, requestId: request.id }, 'unexpected error');
    // An answer under way cannot be taken back; breaking it off tells the reader that it is not whole.
    if (response.headersSent) return void response.destroy();
    problem.instance = request.originalUrl.split('?')[0];
    if (request.id) problem.requestId = request.id;
    if (problem.status === 401) response.setHeader('WWW-Authenticate', 'Bearer realm="eremite"');
    response.status(problem.status).type('application/problem+json').send(JSON.stringify(problem));
  }
}

/** The problem document of any error; only what was thrown on purpose tells its detail. */
export function toProblem(error: unknown): Problem {
  if (error instanceof AppError) {
    const { code, detail, errors, current } = error;
    return {
      ...base(code),
      ...(detail !== undefined && { detail }),
      ...(errors && { errors: [...errors] }),
      ...(current !== undefined && { current }),
    };
  }
  const status = error instanceof HttpException ? error.getStatus() : statusOf(error);
  const code = BY_STATUS[status] ?? (status >= 400 && status < 500 ? 'VALIDATION_FAILED' : undefined);
  return code ? { ...base(code), ...detailOf(error) } : base('INTERNAL');
}

function base(code: ErrorCode): Problem {
  return { type: errorType(code), ...ERROR_CATALOGUE[code] };
}

/** Status an Express body parser or the upload parser gave its error. */
function statusOf(error: unknown): number {
  const { status, code } = (error ?? {}) as { status?: unknown; code?: unknown };
  if (code === 'LIMIT_FILE_SIZE') return 413;
  if (typeof code === 'string' && code.startsWith('LIMIT_')) return 400;
  return typeof status === 'number' && status < 500 ? status : 500;
}

/** The framework's own client errors say in words what was wrong with the request, and nothing of the inside. */
function detailOf(error: unknown): { detail?: string } {
  return error instanceof Error ? { detail: error.message } : {};
}
