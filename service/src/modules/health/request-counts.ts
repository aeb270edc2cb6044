import { Injectable } from '@nestjs/common';
import type { NextFunction, Request, Response } from 'express';

/** Upper bounds of the histogram, seconds. */
const BOUNDS = [0.01, 0.05, 0.1, 0.5, 1, 5, 30];

/** Counts answers by method and class of status, and how long they took. */
@Injectable()
export class RequestCounts {
  readonly #answers = new Map<string, number>();
  readonly #buckets = BOUNDS.map(() => 0);
  #seconds = 0;
  #total = 0;

  readonly middleware = (request: Request, response: Response, next: NextFunction): void => {
    const started = process.hrtime.bigint();
    response.once('finish', () => {
      // A stream of events lasts as long as its reader likes; its time would say nothing.
      const isStream = String(response.getHeader('content-type')).startsWith('text/event-stream');
      this.#count(`${request.method} ${Math.floor(response.statusCode / 100)}xx`);
      if (!isStream) this.#observe(Number(process.hrtime.bigint() - started) / 1e9);
    });
    next();
  };

  lines(): string[] {
    const requests = [...this.#answers].map(([key, total]) => {
      const [method, status] = key.split(' ');
      return `eremite_http_requests_total{method="${method}",status="${status}"} ${total}`;
    });
    return [
      '# HELP eremite_http_requests_total Answers by method and class of status.',
      '# TYPE eremite_http_requests_total counter',
      ...requests,
      '# HELP eremite_http_request_seconds Time to answer.',
      '# TYPE eremite_http_request_seconds histogram',
      ...BOUNDS.map((bound, i) => `eremite_http_request_seconds_bucket{le="${bound}"} ${this.#buckets[i]}`),
      `eremite_http_request_seconds_bucket{le="+Inf"} ${this.#total}`,
      `eremite_http_request_seconds_sum ${this.#seconds.toFixed(6)}`,
      `eremite_http_request_seconds_count ${this.#total}`,
    ];
  }

  #count(key: string): void {
    this.#answers.set(key, (this.#answers.get(key) ?? 0) + 1);
  }

  #observe(seconds: number): void {
    this.#total += 1;
    this.#seconds += seconds;
    for (let i = 0; i < BOUNDS.length; i += 1) if (seconds <= BOUNDS[i]!) this.#buckets[i]! += 1;
  }
}
