import { Inject, Injectable } from '@nestjs/common';
import jwt from 'jsonwebtoken';
import { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { ENV, type Env } from '../../config/env.ts';
import { signingSecret } from '../../config/secret.ts';

const claims = z.object({ sub: z.uuid(), sid: z.uuid() });
const ISSUER = 'eremite';

/** Short-lived signed proof of a browser session. */
@Injectable()
export class AccessTokens {
  readonly #secret: string;
  readonly seconds: number;

  constructor(@Inject(ENV) env: Env) {
    this.#secret = signingSecret(env);
    this.seconds = Math.round(env.accessMinutes * 60);
  }

  sign(userId: string, sessionId: string): string {
    return jwt.sign({ sid: sessionId }, this.#secret, {
      algorithm: 'HS256',
      subject: userId,
      issuer: ISSUER,
      expiresIn: this.seconds,
    });
  }

  /** @throws {AppError} TOKEN_EXPIRED or NOT_SIGNED_IN */
  verify(token: string): { userId: string; sessionId: string } {
    try {
      const { sub, sid } = claims.parse(jwt.verify(token, this.#secret, { algorithms: ['HS256'], issuer: ISSUER }));
      return { userId: sub, sessionId: sid };
    } catch (error) {
      throw new AppError(error instanceof jwt.TokenExpiredError ? 'TOKEN_EXPIRED' : 'NOT_SIGNED_IN');
    }
  }
}
