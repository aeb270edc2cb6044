import { createHmac, timingSafeEqual } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import { ENV, type Env } from '../../config/env.ts';
import { signingSecret } from '../../config/secret.ts';

/** The value a browser must echo, bound to its session so that one planted by another site's subdomain is of no use. */
@Injectable()
export class CsrfTokens {
  readonly #secret: string;

  constructor(@Inject(ENV) env: Env) {
    this.#secret = signingSecret(env);
  }

  of(sessionId: string): string {
    return createHmac('sha256', this.#secret).update(`csrf:${sessionId}`).digest('base64url');
  }

  fits(sessionId: string, given: string | undefined): boolean {
    const expected = Buffer.from(this.of(sessionId));
    const actual = Buffer.from(given ?? '');
    return expected.length === actual.length && timingSafeEqual(expected, actual);
  }
}
