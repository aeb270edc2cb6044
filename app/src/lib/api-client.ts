import type { z } from 'zod';
import { API_BASE } from '#config/paths.ts';
import { ApiError, toApiError, unreachable } from './api-error.ts';

interface CallOptions {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  json?: unknown;
  form?: FormData;
  headers?: Record<string, string>;
  signal?: AbortSignal;
}

/** The readable cookie that unsafe requests echo, so that another site cannot make them. */
function csrfToken(): string {
  return /(?:^|;\s*)csrf=([^;]*)/.exec(document.cookie)?.[1] ?? '';
}

async function send(path: string, options: CallOptions): Promise<Response> {
  const { method = 'GET', json, form, signal } = options;
  const headers: Record<string, string> = { accept: 'application/json', ...options.headers };
  if (method !== 'GET') headers['x-csrf-token'] = decodeURIComponent(csrfToken());
  if (json !== undefined) headers['content-type'] = 'application/json';
  const body = form ?? (json === undefined ? undefined : JSON.stringify(json));
  try {
    // The query cache is the only cache: an ETag names the version to change, not the whole of the answer.
    return await fetch(`${API_BASE}${path}`, {
      method,
      headers,
      body,
      signal,
      credentials: 'same-origin',
      cache: 'no-store',
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw unreachable();
  }
}

let refreshing: Promise<boolean> | undefined;
/** Renews the session once, however many requests found it ended at the same moment. */
function refreshSession(): Promise<boolean> {
  refreshing ??= send('/auth/refresh', { method: 'POST' })
    .then((answer) => answer.ok)
    .catch(() => false)
    .finally(() => (refreshing = undefined));
  return refreshing;
}

/** Calls the service; a session that has merely aged is renewed and the call repeated. @throws {ApiError} */
export async function request(path: string, options: CallOptions = {}): Promise<Response> {
  let answer = await send(path, options);
  if (answer.status === 401 && !path.startsWith('/auth/') && (await refreshSession())) {
    answer = await send(path, options);
  }
  if (!answer.ok) throw await toApiError(answer);
  return answer;
}

/** Calls the service and checks the answer against its contract. @throws {ApiError} */
export async function call<S extends z.ZodType>(
  contract: S,
  path: string,
  options: CallOptions = {},
): Promise<z.output<S>> {
  const answer = await request(path, options);
  const body: unknown = answer.status === 204 ? undefined : await answer.json();
  const read = contract.safeParse(body);
  if (read.success) return read.data;
  throw new ApiError(500, 'INTERNAL', {
    type: 'about:blank',
    title: 'The service answered in a shape this page does not know',
    status: 500,
    detail: `The answer of ${path} does not fit its contract at ${read.error.issues[0]?.path.join('/') ?? 'the root'}. Reload the page; if it stays, tell the administrator.`,
  });
}

/** Calls the service for its effect only. @throws {ApiError} */
export async function act(path: string, options: CallOptions): Promise<void> {
  await request(path, options);
}
