import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, openAsBlob, readFileSync, rmSync, statSync } from 'node:fs';
import { cpus, loadavg, tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import type { Client } from '../support/client.ts';
import { startServer } from '../support/start-server.ts';
import { writeCatalogue } from './intake-table.ts';

const PYTHON = '/usr/bin/python3';
// Seen from the bundle in tests/bench/dist.
const SCRIPT = join(import.meta.dirname, '../astropy_tables.py');
const MAIN = process.env['EREMITE_BENCH_MAIN'] ?? join(import.meta.dirname, '../../../service/dist/main.js');
const ADMIN = { email: 'bench@example.org', password: 'a long enough password' };
const SETTINGS = { kind: 'optical', columns: { ra: 'ra_deg', dec: 'dec_deg' }, units: { ra: 'deg', dec: 'deg' } };

/** Lines of the table: the file, its rows, and the most times the other program's time that is aimed at. */
const CASES = {
  csv: { title: 'CSV', kind: 'csv', aim: 2 },
  fits: { title: 'FITS', kind: 'fits', aim: 3 },
  tabledata: { title: 'VOTable TABLEDATA', kind: 'tabledata', aim: 1 },
  binary2: { title: 'VOTable BINARY2', kind: 'binary2', aim: 3 },
} as const;
type CaseName = keyof typeof CASES;

const inSeconds = (ms: number): string => `${(ms / 1000).toFixed(2)} s`;
const inGiB = (bytes: number): string => `${(bytes / 2 ** 30).toFixed(2)} GiB`;
const hasPython = (): boolean => spawnSync(PYTHON, ['-c', 'import astropy']).status === 0;

/** Asks for the sign of life all the while; milliseconds of each answer. */
function watchHealth(client: Client): { stop(): Promise<number[]> } {
  const times: number[] = [];
  let going = true;
  const watching = (async () => {
    while (going) {
      const start = performance.now();
      const answer = await client.raw('GET', '//health/live');
      await answer.arrayBuffer();
      times.push(performance.now() - start);
      await sleep(10);
    }
  })();
  return {
    stop: async () => {
      going = false;
      await watching;
      return times.sort((a, b) => a - b);
    },
  };
}

/** Peak memory of a process since it started, bytes. */
function peakOf(pid: number): number {
  return Number(/VmHWM:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))![1]) * 1024;
}

/** Milliseconds of processor time of a process, all its threads, since it started. */
function cpuOf(pid: number): number {
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8')
    .replace(/^.*\) /, '')
    .split(' ');
  // Fields 14 and 15, user and system, in hundredths of a second.
  return (Number(fields[11]) + Number(fields[12])) * 10;
}

function folderBytes(path: string): number {
  return Number(execFileSync('du', ['-sb', path], { encoding: 'utf8' }).split('\t')[0]);
}

/** Uploads and publishes one file on the built server, on a new database. */
async function measure(path: string) {
  const dataDir = mkdtempSync(join(process.env['EREMITE_BENCH_DIR'] ?? tmpdir(), 'bench-data-'));
  const env = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };
  const server = await startServer({ main: MAIN, dataDir, env, timeoutMs: 240_000 });
  try {
    const client = await server.signIn(ADMIN.email, ADMIN.password);
    const team = await client.post('/teams', { name: 'bench' });
    const survey = await client.post('/surveys', { teamId: team.body.id, name: 'bench' });
    const form = new FormData();
    form.append('settings', JSON.stringify(SETTINGS));
    form.append('file', await openAsBlob(path), basename(path));
    const idlePeak = peakOf(server.process.pid!);
    const health = watchHealth(server.client());
    const start = performance.now();
    const upload = await client.raw('POST', `/surveys/${survey.body.id}/intakes`, form);
    const intake = (await upload.json()) as { id: string; rows: number };
    if (upload.status !== 201) throw new Error(JSON.stringify(intake));
    const checked = performance.now();
    const cpuBefore = cpuOf(server.process.pid!);
    const uploadPeak = peakOf(server.process.pid!);
    const { body: job } = await client.post(`/intakes/${intake.id}/publish`);
    for (;;) {
      const { body } = await client.get(`/jobs/${job.jobId}`);
      if (body.state === 'done') break;
      if (body.state === 'failed') throw new Error(JSON.stringify(body));
      await sleep(50);
    }
    const done = performance.now();
    const times = await health.stop();
    return {
      rows: intake.rows,
      checkMs: checked - start,
      publishMs: done - checked,
      cpuMs: cpuOf(server.process.pid!) - cpuBefore,
      idlePeak,
      uploadPeak,
      peak: peakOf(server.process.pid!),
      p99: times[Math.floor(times.length * 0.99)]!,
      slowest: times.at(-1)!,
      disk: folderBytes(server.dataDir),
    };
  } finally {
    await server.stop();
    rmSync(dataDir, { recursive: true, force: true });
  }
}

function astropyReads(path: string, kind: string) {
  const text = execFileSync(PYTHON, [SCRIPT, 'read', path, kind], { encoding: 'utf8' });
  return JSON.parse(text) as { rows: number; seconds: number; peakBytes: number; program: string };
}

const load = (): string => loadavg()[0]!.toFixed(1);

/** Prints one line a case. `large` asks for the CSV of ten million rows, without the other program. */
async function main(names: CaseName[], csvRows: number, votableRows: number): Promise<void> {
  const folder = mkdtempSync(join(process.env['EREMITE_BENCH_DIR'] ?? tmpdir(), 'bench-intake-'));
  const python = csvRows <= 1_000_000 && hasPython();
  try {
    const csv = join(folder, 'catalogue.csv');
    await writeCatalogue(csv, csvRows);
    console.log(
      `${cpus().length} x ${cpus()[0]!.model.trim()}, Node ${process.version}, load ${load()} at the start\n`,
    );
    console.log(
      '| case | rows | size | upload and check | publish | rows/s | CPU to publish | peak at start, check, publish | live p99 | slowest | on disk | astropy | its peak | ratio | with the check |',
    );
    console.log('|---|---|---|---|---|---|---|---|---|---|---|---|---|---|---|');
    for (const name of names) {
      const { title, kind, aim } = CASES[name];
      const path = kind === 'csv' ? csv : join(folder, `${kind}.${kind === 'fits' ? 'fits' : 'vot'}`);
      if (!existsSync(path)) {
        if (!python) {
          console.log(`| ${title} | not measured: making it needs ${PYTHON} with astropy |`);
          continue;
        }
        execFileSync(PYTHON, [SCRIPT, 'make', csv, String(kind === 'fits' ? csvRows : votableRows), path, kind]);
      }
      const ours = await measure(path);
      const other = python ? astropyReads(path, kind) : undefined;
      const line = [
        title,
        ours.rows.toLocaleString('en'),
        `${(statSync(path).size / 1e6).toFixed(0)} MB`,
        inSeconds(ours.checkMs),
        inSeconds(ours.publishMs),
        Math.round((ours.rows / ours.publishMs) * 1000).toLocaleString('en'),
        inSeconds(ours.cpuMs),
        `${inGiB(ours.idlePeak)}, ${inGiB(ours.uploadPeak)}, ${inGiB(ours.peak)}`,
        `${ours.p99.toFixed(0)} ms`,
        `${ours.slowest.toFixed(0)} ms`,
        `${(ours.disk / 1e6).toFixed(0)} MB`,
        other ? `${other.seconds.toFixed(2)} s (${other.program})` : '',
        other ? inGiB(other.peakBytes) : '',
        other ? `${(ours.publishMs / 1000 / other.seconds).toFixed(2)} (aim ${aim})` : '',
        other ? ((ours.checkMs + ours.publishMs) / 1000 / other.seconds).toFixed(2) : '',
      ];
      console.log(`| ${line.join(' | ')} |`);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

const asked = process.argv.slice(2);
const large = asked.includes('large');
const names = asked.filter((name): name is CaseName => name in CASES);
await main(
  large ? ['csv'] : names.length ? names : (Object.keys(CASES) as CaseName[]),
  large ? 10_000_000 : 1_000_000,
  200_000,
);
