import { DrizzleQueryError } from 'drizzle-orm/errors';
import { describe, expect, it } from 'vitest';
import { loggedError } from './request-log.ts';

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
