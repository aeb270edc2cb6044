import { createHash } from 'node:crypto';
import {
  type CallHandler,
  type ExecutionContext,
  Injectable,
  type NestInterceptor,
  StreamableFile,
} from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import type { Response } from 'express';
import { catchError, from, mergeMap, type Observable, of, switchMap, throwError } from 'rxjs';
import { AppError } from './app-error.ts';
import { IdempotencyRepository } from './idempotency.repository.ts';
import { IS_SECRET } from './secret-answer.ts';
import type { SignedInRequest } from './signed-in-user.ts';

/** A POST repeated with the same Idempotency-Key gets the first answer again and does nothing. */
@Injectable()
export class IdempotencyInterceptor implements NestInterceptor {
  constructor(
    private readonly answers: IdempotencyRepository,
    private readonly reflector: Reflector,
  ) {}

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const http = context.switchToHttp();
    const request = http.getRequest<SignedInRequest>();
    const key = request.get('idempotency-key');
    if (request.method !== 'POST' || !request.user || key === undefined) return next.handle();
    if (this.reflector.get<boolean>(IS_SECRET, context.getHandler())) return next.handle();
    if (!/^[\x21-\x7e]{1,200}$/.test(key)) {
      throw new AppError('VALIDATION_FAILED', 'Idempotency-Key: 1 to 200 printable characters without blanks.');
    }
    const id = { userId: request.user.id, key };
    const response = http.getResponse<Response>();
    const path = request.originalUrl;
    const bodyHash = hashOf(request);
    const earlier = await this.answers.claim(id, path, bodyHash);
    if (earlier) return of(repeat(earlier, path, bodyHash, response));
    return next.handle().pipe(
      switchMap((answer: unknown) =>
        from(this.#keep(id, response.statusCode, answer)).pipe(mergeMap(() => of(answer))),
      ),
      catchError((error: unknown) =>
        // A failed request changed nothing, so it may be tried again with the same key.
        from(this.answers.forget(id)).pipe(mergeMap(() => throwError(() => error))),
      ),
    );
  }

  #keep(id: { userId: string; key: string }, status: number, answer: unknown): Promise<void> {
    return answer instanceof StreamableFile ? this.answers.forget(id) : this.answers.keep(id, status, answer ?? null);
  }
}

function repeat(
  earlier: { path: string; bodyHash: string; status: number | null; answer: unknown },
  path: string,
  bodyHash: string,
  response: Response,
): unknown {
  if (earlier.path !== path || earlier.bodyHash !== bodyHash) {
    throw new AppError('CONFLICT', 'This Idempotency-Key was used for another request.');
  }
  if (earlier.status === null)
    throw new AppError('CONFLICT', 'The first request with this key is still being worked on.');
  response.status(earlier.status);
  response.setHeader('Idempotent-Replay', 'true');
  return earlier.answer ?? undefined;
}

/** Of the JSON body; an upload is not read yet, and its length has to do. */
function hashOf(request: SignedInRequest): string {
  const body: unknown = request.body;
  return createHash('sha256')
    .update(body === undefined ? `length ${request.get('content-length') ?? ''}` : JSON.stringify(body))
    .digest('hex');
}
