import type { CookieOptions, Request, Response } from 'express';
import type { Env } from '../../config/env.ts';

export const ACCESS_COOKIE = 'access';
export const REFRESH_COOKIE = 'refresh';
export const CSRF_COOKIE = 'csrf';
export const CSRF_HEADER = 'x-csrf-token';
const REFRESH_PATH = '/api/v1/auth';

export interface SessionTokens {
  readonly access: string;
  readonly accessSeconds: number;
  /** Absent when only the access token is renewed. */
  readonly refresh?: { readonly token: string; readonly expiresAt: Date };
  readonly csrf: string;
}

/** Cookies are for https only where the installation is reached by https. */
function shared(env: Pick<Env, 'publicUrl'>): CookieOptions {
  return { sameSite: 'lax', secure: env.publicUrl?.startsWith('https:') ?? false };
}

export function setSessionCookies(response: Response, env: Env, tokens: SessionTokens): void {
  const common = shared(env);
  response.cookie(ACCESS_COOKIE, tokens.access, {
    ...common,
    httpOnly: true,
    path: '/',
    maxAge: tokens.accessSeconds * 1000,
  });
  if (tokens.refresh) {
    const { token, expiresAt } = tokens.refresh;
    // Readable by the application, which echoes it: another site can make a browser send it but cannot read it.
    response.cookie(CSRF_COOKIE, tokens.csrf, { ...common, path: '/', expires: expiresAt });
    response.cookie(REFRESH_COOKIE, token, { ...common, httpOnly: true, path: REFRESH_PATH, expires: expiresAt });
  }
}

export function clearSessionCookies(response: Response, env: Env): void {
  const common = shared(env);
  response.clearCookie(ACCESS_COOKIE, { ...common, httpOnly: true, path: '/' });
  response.clearCookie(CSRF_COOKIE, { ...common, path: '/' });
  response.clearCookie(REFRESH_COOKIE, { ...common, httpOnly: true, path: REFRESH_PATH });
}

/** A cookie's value; undefined when it is absent or not plain text. */
export function cookieOf(request: Request, name: string): string | undefined {
  const value: unknown = (request.cookies as Record<string, unknown> | undefined)?.[name];
  return typeof value === 'string' && value !== '' ? value : undefined;
}
