/** An answer of the service, read to the end. */
export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  readonly text: string;
  /** Parsed JSON, or undefined for anything else. A test knows what it expects. */
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  readonly body: any;
}

type Extra = Record<string, string>;

/** A browser as far as HTTP goes: keeps cookies and echoes the csrf one. Paths are relative to /api/v1 unless they begin with //. */
export class Client {
  readonly #cookies = new Map<string, string>();

  constructor(
    readonly url: string,
    private readonly bearer?: string,
  ) {}

  get(path: string, headers: Extra = {}): Promise<Answer> {
    return this.request('GET', path, undefined, headers);
  }
  post(path: string, body?: unknown, headers: Extra = {}): Promise<Answer> {
    return this.request('POST', path, body ?? {}, headers);
  }
  put(path: string, body: unknown, headers: Extra = {}): Promise<Answer> {
    return this.request('PUT', path, body, headers);
  }
  patch(path: string, body: unknown, headers: Extra = {}): Promise<Answer> {
    return this.request('PATCH', path, body, headers);
  }
  delete(path: string, body?: unknown, headers: Extra = {}): Promise<Answer> {
    return this.request('DELETE', path, body, headers);
  }

  /** Sends a file as multipart form, with further fields; objects go as JSON. */
  upload(
    path: string,
    name: string,
    content: string | Uint8Array,
    fields: Record<string, unknown> = {},
  ): Promise<Answer> {
    const form = new FormData();
    for (const [key, value] of Object.entries(fields)) {
      form.append(key, typeof value === 'string' ? value : JSON.stringify(value));
    }
    const bytes = typeof content === 'string' ? content : new Uint8Array(content);
    form.append('file', new Blob([bytes]), name);
    return this.request('POST', path, form);
  }

  async request(method: string, path: string, body?: unknown, headers: Extra = {}): Promise<Answer> {
    const response = await this.raw(method, path, body, headers);
    const text = await response.text();
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    return {
      status: response.status,
      headers: response.headers,
      text,
      body: isJson && text ? JSON.parse(text) : undefined,
    };
  }

  /** The response as it comes, for streams. */
  async raw(
    method: string,
    path: string,
    body?: unknown,
    headers: Extra = {},
    signal?: AbortSignal,
  ): Promise<Response> {
    const sent: Extra = { ...this.#identity(), ...headers };
    const isJson = body !== undefined && !(body instanceof FormData) && typeof body !== 'string';
    if (isJson) sent['content-type'] ??= 'application/json';
    const response = await fetch(path.startsWith('//') ? this.url + path.slice(1) : `${this.url}/api/v1${path}`, {
      method,
      headers: sent,
      redirect: 'manual',
      ...(body !== undefined && { body: isJson ? JSON.stringify(body) : (body as BodyInit) }),
      ...(signal && { signal }),
    });
    this.#keep(response.headers.getSetCookie());
    return response;
  }

  cookie(name: string): string | undefined {
    return this.#cookies.get(name);
  }
  setCookie(name: string, value: string): void {
    this.#cookies.set(name, value);
  }

  #identity(): Extra {
    if (this.bearer) return { authorization: `Bearer ${this.bearer}` };
    const cookie = [...this.#cookies].map(([name, value]) => `${name}=${value}`).join('; ');
    const csrf = this.#cookies.get('csrf');
    return { ...(cookie && { cookie }), ...(csrf && { 'x-csrf-token': csrf }) };
  }

  #keep(lines: readonly string[]): void {
    for (const line of lines) {
      const [pair = ''] = line.split(';');
      const name = pair.slice(0, pair.indexOf('='));
      const value = pair.slice(pair.indexOf('=') + 1);
      if (value === '' || /expires=thu, 01 jan 1970/i.test(line)) this.#cookies.delete(name);
      else this.#cookies.set(name, value);
    }
  }
}
