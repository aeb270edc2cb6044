import { existsSync, readFileSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { resolve } from 'node:path';
import { parseEnv } from 'node:util';
import { z } from 'zod';

const onOff = (fallback: 'on' | 'off') =>
  z
    .enum(['on', 'off'])
    .default(fallback)
    .transform((value) => value === 'on');
const optional = <T extends z.ZodType>(schema: T) => z.preprocess((v) => (v === '' ? undefined : v), schema.optional());
/** bytes of `2 GiB`, `500 MB`, `1000`. */
const bytes = z.string().transform((text, context) => {
  const match = /^\s*(\d+(?:\.\d+)?)\s*([kMG]?)(i?)B?\s*$/.exec(text);
  if (!match) {
    context.addIssue({ code: 'custom', message: 'expected a size such as 500MB or 2GiB' });
    return z.NEVER;
  }
  const power = { '': 0, k: 1, M: 2, G: 3 }[match[2]!] ?? 0;
  return Math.floor(Number(match[1]) * (match[3] ? 1024 : 1000) ** power);
});

/** Every variable the service reads; the table in the README lists the same. */
const variables = z.object({
  PORT: z.coerce.number().int().min(0).max(65_535).default(4870),
  EREMITE_HOST: z.string().default('0.0.0.0'),
  EREMITE_DATA_DIR: z.string().min(1).default('./.data'),
  DATABASE_URL: optional(z.string().regex(/^postgres(ql)?:\/\//, 'expected postgres://...')),
  EREMITE_PUBLIC_URL: optional(z.url()),
  EREMITE_SECRET: optional(z.string().min(32, 'at least 32 characters')),
  EREMITE_ADMIN_EMAIL: optional(z.email().toLowerCase()),
  EREMITE_ADMIN_PASSWORD: optional(z.string().min(10, 'at least 10 characters')),
  EREMITE_DEMO: onOff('on'),
  EREMITE_DEMO_PASSWORD: optional(z.string().min(10, 'at least 10 characters')),
  EREMITE_SMTP_URL: optional(z.string().regex(/^smtps?:\/\//, 'expected smtp://...')),
  SMTP_URL: optional(z.string().regex(/^smtps?:\/\//, 'expected smtp://...')),
  EREMITE_MAIL_FROM: z.string().default('Eremite <eremite@localhost>'),
  EREMITE_METRICS_TOKEN: optional(z.string().min(16, 'at least 16 characters')),
  EREMITE_LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info'),
  EREMITE_MAX_UPLOAD: bytes.prefault('4GiB'),
  EREMITE_MAX_UNPACKED: bytes.prefault('20GiB'),
  EREMITE_MAX_COLUMNS: z.coerce.number().int().min(1).max(100_000).default(5000),
  EREMITE_MAX_CELL: bytes.prefault('1MiB'),
  EREMITE_MAX_IMAGE_PIXELS: z.coerce.number().int().min(1).max(1_000_000_000).default(40_000_000),
  EREMITE_JOB_WORKERS: z.coerce.number().int().min(0).max(64).default(2),
  EREMITE_THREADS: z.coerce.number().int().min(1).max(256).optional(),
  EREMITE_RUN_MEMORY: bytes.prefault('1GiB'),
  EREMITE_THREAD_MEMORY: bytes.prefault('1GiB'),
  EREMITE_TRUST_PROXY: z.coerce.number().int().min(0).max(10).default(0),
  EREMITE_ACCESS_MINUTES: z.coerce.number().positive().max(1440).default(60),
});

export interface Env {
  readonly port: number;
  readonly host: string;
  /** Absolute path. */
  readonly dataDir: string;
  /** PostgreSQL in place of the built-in database. */
  readonly databaseUrl: string | undefined;
  /** In memory only: for tests. */
  readonly databaseInMemory: boolean;
  /** A migrated data directory to start an in-memory database from: for tests. */
  readonly databaseTemplate: string | undefined;
  readonly publicUrl: string | undefined;
  readonly secret: string | undefined;
  readonly adminEmail: string | undefined;
  readonly adminPassword: string | undefined;
  readonly demo: boolean;
  readonly demoPassword: string | undefined;
  readonly smtpUrl: string | undefined;
  readonly mailFrom: string;
  readonly metricsToken: string | undefined;
  readonly logLevel: string;
  readonly maxUploadBytes: number;
  /** Of a table that is read. */
  readonly tableLimits: { readonly maxBytes: number; readonly maxColumns: number; readonly maxCellLength: number };
  /** Pixels of an image. */
  readonly maxImagePixels: number;
  readonly jobWorkers: number;
  /** Threads of a run. */
  readonly threads: number;
  /** Bytes of catalogue rows that a run may hold. */
  readonly runMemoryBytes: number;
  /** Bytes of heap that one thread of a run may use besides those rows. */
  readonly threadMemoryBytes: number;
  readonly trustProxy: number;
  readonly accessMinutes: number;
}

/** Injection token of the validated environment. */
export const ENV = Symbol('ENV');

/** Raised at start with one line for every variable at fault. */
export class EnvError extends Error {
  override readonly name = 'EnvError';
}

function fromFile(): Record<string, string | undefined> {
  return existsSync('.env') ? parseEnv(readFileSync('.env', 'utf8')) : {};
}

/** Threads of a run or a plan, of the environment alone: a plan needs nothing else of it. */
export function readThreads(): number {
  const asked = Number({ ...fromFile(), ...process.env }['EREMITE_THREADS']);
  return asked >= 1 ? Math.min(256, Math.floor(asked)) : availableParallelism();
}

/** The validated environment: `overrides` before the process before the file `.env`. The only reader of process.env. */
export function readEnv(overrides: Partial<Env> = {}): Env {
  const parsed = variables.safeParse({ ...fromFile(), ...process.env });
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new EnvError(`The environment is not usable:\n${lines.join('\n')}`);
  }
  const value = parsed.data;
  return Object.freeze({
    port: value.PORT,
    host: value.EREMITE_HOST,
    dataDir: resolve(overrides.dataDir ?? value.EREMITE_DATA_DIR),
    databaseUrl: value.DATABASE_URL,
    databaseInMemory: false,
    databaseTemplate: undefined,
    publicUrl: value.EREMITE_PUBLIC_URL?.replace(/\/+$/, ''),
    secret: value.EREMITE_SECRET,
    adminEmail: value.EREMITE_ADMIN_EMAIL,
    adminPassword: value.EREMITE_ADMIN_PASSWORD,
    demo: value.EREMITE_DEMO,
    demoPassword: value.EREMITE_DEMO_PASSWORD,
    smtpUrl: value.EREMITE_SMTP_URL ?? value.SMTP_URL,
    mailFrom: value.EREMITE_MAIL_FROM,
    metricsToken: value.EREMITE_METRICS_TOKEN,
    logLevel: value.EREMITE_LOG_LEVEL,
    maxUploadBytes: value.EREMITE_MAX_UPLOAD,
    tableLimits: {
      maxBytes: value.EREMITE_MAX_UNPACKED,
      maxColumns: value.EREMITE_MAX_COLUMNS,
      maxCellLength: value.EREMITE_MAX_CELL,
    },
    maxImagePixels: value.EREMITE_MAX_IMAGE_PIXELS,
    jobWorkers: value.EREMITE_JOB_WORKERS,
    threads: value.EREMITE_THREADS ?? readThreads(),
    runMemoryBytes: value.EREMITE_RUN_MEMORY,
    threadMemoryBytes: value.EREMITE_THREAD_MEMORY,
    trustProxy: value.EREMITE_TRUST_PROXY,
    accessMinutes: value.EREMITE_ACCESS_MINUTES,
    ...overrides,
  });
}
