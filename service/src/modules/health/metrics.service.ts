import { Injectable } from '@nestjs/common';
import { JobsRepository } from '../../jobs/jobs.repository.ts';
import { RequestCounts } from './request-counts.ts';

/** Figures in the Prometheus text format. */
@Injectable()
export class MetricsService {
  constructor(
    private readonly jobs: JobsRepository,
    private readonly requests: RequestCounts,
  ) {}

  async text(): Promise<string> {
    const { rss, heapUsed } = process.memoryUsage();
    const jobs = await this.jobs.counts();
    return [
      ...gauge('eremite_process_resident_memory_bytes', 'Resident memory.', [['', rss]]),
      ...gauge('eremite_process_heap_bytes', 'Heap in use.', [['', heapUsed]]),
      ...gauge('eremite_process_uptime_seconds', 'Time since the start.', [['', Math.round(process.uptime())]]),
      ...gauge(
        'eremite_jobs',
        'Jobs by kind and state.',
        jobs.map(({ kind, state, total }) => [`{kind="${label(kind)}",state="${label(state)}"}`, total]),
      ),
      ...this.requests.lines(),
      '',
    ].join('\n');
  }
}

const label = (text: string): string => text.replace(/[\\"\n]/g, '_');

function gauge(name: string, help: string, values: (readonly [labels: string, value: number])[]): string[] {
  return [
    `# HELP ${name} ${help}`,
    `# TYPE ${name} gauge`,
    ...values.map(([labels, value]) => `${name}${labels} ${value}`),
  ];
}
