import { afterEach, describe, expect, it, vi } from 'vitest';
import { readEnv } from './env.ts';

describe('the environment', () => {
  afterEach(() => vi.unstubAllEnvs());

  it('has a default for everything', () => {
    expect(readEnv()).toMatchObject({ port: 4870, demo: true, databaseUrl: undefined, maxUploadBytes: 4 * 2 ** 30 });
    expect(readEnv().tableLimits).toEqual({ maxBytes: 20 * 2 ** 30, maxColumns: 5000, maxCellLength: 2 ** 20 });
  });

  it('names every variable at fault at once', () => {
    vi.stubEnv('PORT', 'eighty');
    vi.stubEnv('EREMITE_DEMO', 'maybe');
    vi.stubEnv('EREMITE_SECRET', 'short');
    expect(() => readEnv()).toThrow(/PORT:[^]*EREMITE_SECRET: at least 32[^]*EREMITE_DEMO:/);
  });

  it('takes an empty variable for an absent one, as containers set them', () => {
    vi.stubEnv('DATABASE_URL', '');
    vi.stubEnv('EREMITE_SMTP_URL', '');
    expect(readEnv()).toMatchObject({ databaseUrl: undefined, smtpUrl: undefined });
  });

  it.each([
    ['500MB', 500e6],
    ['2 GiB', 2 ** 31],
    ['1000', 1000],
  ])('reads %s as a size', (text, bytes) => {
    vi.stubEnv('EREMITE_MAX_UPLOAD', text);
    expect(readEnv().maxUploadBytes).toBe(bytes);
  });
});
