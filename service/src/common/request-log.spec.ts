import type { IncomingMessage, ServerResponse } from 'node:http';
import { DrizzleQueryError } from 'drizzle-orm/errors';
import { describe, expect, it } from 'vitest';
import { levelOf, loggedError } from './request-log.ts';

describe('loggedError', () => {
  it('leaves the values of a failed query out, wherever they stand', () => {
    const cause = Object.assign(new Error('duplicate key value'), { code: '23505' });
    const error = new DrizzleQueryError('insert into users values ($1)', ['ada@example.org'], cause);
    const shown = JSON.stringify(loggedError(error));
    expect(error.message).toContain('ada@example.org');
    expect(shown).not.toContain('ada@example.org');
    expect(shown).toContain('duplicate key value');
  });
});

describe('levelOf', () => {
  const level = (url: string, statusCode: number, error?: Error) =>
    levelOf({ url } as IncomingMessage, { statusCode } as ServerResponse, error);

  it('takes no alarm at a probe that comes before the server is ready', () => {
    expect(level('/api/v1/health/ready?by=probe', 503, new Error('503'))).toBe('debug');
  });

  it('calls any other failure of the server an error', () => {
    expect(level('/api/v1/surveys', 503)).toBe('error');
    expect(level('/api/v1/health/ready', 500)).toBe('error');
    expect(level('/api/v1/surveys', 404)).toBe('info');
  });
});
