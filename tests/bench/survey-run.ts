import { execFileSync, spawn, spawnSync } from 'node:child_process';
import { mkdtempSync, openAsBlob, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { Detections } from '@eremite/service/scoring/detections.ts';
import { readPlan } from '@eremite/service/plan/read-plan.ts';
import { readPlanTable } from '@eremite/service/plan/read-plan-table.ts';
import type { Client } from '../support/client.ts';
import { startServer } from '../support/start-server.ts';
import { writeSurvey } from './survey-tables.ts';

const PYTHON = '/usr/bin/python3';
const HERE = join(import.meta.dirname, '..');
const DIST = process.env['EREMITE_BENCH_DIST'] ?? join(HERE, '../../service/dist');
const ADMIN = { email: 'bench@example.org', password: 'a long enough password' };
const CATALOGUES = ['deep', 'near', 'violet', 'redshifts'];

const median = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;
const inSeconds = (value: number): string => `${value.toFixed(2)} s`;
const inGiB = (bytes: number): string => `${(bytes / 2 ** 30).toFixed(2)} GiB`;
const hasPython = (): boolean => spawnSync(PYTHON, ['-c', 'import astropy']).status === 0;

/** Peak memory of a process and the processor time it has had, as Linux tells them. */
function usage(pid: number): { peakBytes: number; cpuSeconds: number } {
  const peak = /VmHWM:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'));
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]!.split(' ');
  return { peakBytes: Number(peak?.[1] ?? 0) * 1024, cpuSeconds: (Number(fields[11]) + Number(fields[12])) / 100 };
}

interface Done {
  seconds: number;
  cpuSeconds: number;
  peakBytes: number;
}

/** Carries out the plan in a process of its own, as a script does. */
async function carryOut(folder: string): Promise<Done> {
  const start = performance.now();
  const arguments_ = [join(DIST, 'plan.js'), join(folder, 'plan.json'), '--out', join(folder, 'out')];
  const child = spawn(process.execPath, arguments_, { stdio: 'ignore' });
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve));
  let last = { peakBytes: 0, cpuSeconds: 0 };
  const timer = setInterval(() => {
    try {
      const now = usage(child.pid!);
      // A process that is ending tells no memory any more.
      last = { peakBytes: Math.max(last.peakBytes, now.peakBytes), cpuSeconds: now.cpuSeconds };
    } catch {
      // It has ended between two looks.
    }
  }, 50);
  const code = await ended;
  clearInterval(timer);
  if (code !== 0) throw new Error(`the plan ended with ${code}`);
  return { seconds: (performance.now() - start) / 1000, ...last };
}

/** Search radius of each detection, for the other program. */
async function writeRadii(folder: string): Promise<void> {
  const { plan, files } = readPlan(join(folder, 'plan.json'));
  const answer = await readPlanTable({ path: files[0]!, file: 'hi.csv', index: 0, settings: plan.tables[0]!.settings });
  if ('faults' in answer) throw new Error(answer.faults.join('\n'));
  const input = {
    survey: plan.survey.cosmology,
    criteria: plan.criteria,
    catalogues: [answer.table.catalogue],
    decisions: { overrides: [], distances: [] },
  };
  const detections = new Detections(input);
  const radii = Float64Array.from(detections.range(0, detections.length), ({ searchArcsec }) => searchArcsec);
  writeFileSync(join(folder, 'radius.f64'), new Uint8Array(radii.buffer));
}

async function benchPlan(folder: string, repeats: number): Promise<void> {
  const runs: Done[] = [];
  for (let i = 0; i < repeats; i++) runs.push(await carryOut(folder));
  const { counts } = JSON.parse(readFileSync(join(folder, 'out', 'summary.json'), 'utf8')) as {
    counts: { candidates: number; starlight: Record<string, number> };
  };
  await writeRadii(folder);
  const other = hasPython()
    ? (JSON.parse(
        execFileSync(PYTHON, [join(HERE, 'astropy_plan.py'), folder, CATALOGUES.join(','), String(repeats)], {
          encoding: 'utf8',
        }),
      ) as { seconds: number[]; pairs: number; peakBytes: number; program: string })
    : undefined;
  const seconds = median(runs.map((run) => run.seconds));
  const theirs = other && median(other.seconds);
  const line = [
    'plan: CSV to verdicts.csv',
    counts.candidates.toLocaleString('en'),
    inSeconds(seconds),
    inSeconds(median(runs.map(({ cpuSeconds }) => cpuSeconds))),
    inGiB(Math.max(...runs.map(({ peakBytes }) => peakBytes))),
    theirs === undefined ? 'not there' : inSeconds(theirs),
    other ? inGiB(other.peakBytes) : '',
    theirs === undefined ? '' : `${(theirs / seconds).toFixed(2)} (aim 1)`,
    other ? (other.pairs === counts.candidates ? 'yes' : `NO: ${other.pairs}`) : '',
    other?.program ?? '',
  ];
  console.log(`| ${line.join(' | ')} |`);
  if (other && other.pairs !== counts.candidates) process.exitCode = 1;
}

async function finished(client: Client, jobId: string, look: (message: string) => void = () => undefined) {
  for (;;) {
    const { body } = await client.get(`/jobs/${jobId}`);
    look(body.message as string);
    if (body.state === 'done') return;
    if (body.finishedAt) throw new Error(JSON.stringify(body.error));
    await sleep(50);
  }
}

/** A run on published tables: its phases by the job's own words, and a light request all the while. */
async function benchRun(folder: string, repeats: number): Promise<void> {
  const dataDir = mkdtempSync(join(tmpdir(), 'bench-run-'));
  const env = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };
  const server = await startServer({ main: join(DIST, 'main.js'), dataDir, env, timeoutMs: 300_000 });
  try {
    const client = await server.signIn(ADMIN.email, ADMIN.password);
    const { plan } = readPlan(join(folder, 'plan.json'));
    const team = await client.post('/teams', { name: 'bench' });
    const survey = await client.post('/surveys', { teamId: team.body.id, name: 'bench' });
    for (const { file, settings } of plan.tables) {
      const form = new FormData();
      form.append('settings', JSON.stringify(settings));
      form.append('file', await openAsBlob(join(folder, file)), file);
      const intake = (await (await client.raw('POST', `/surveys/${survey.body.id}/intakes`, form)).json()) as {
        id: string;
      };
      const { body } = await client.post(`/intakes/${intake.id}/publish`);
      await finished(client, body.jobId as string);
    }
    const criteria = await client.post(`/surveys/${survey.body.id}/criteria`, { settings: plan.criteria });
    const phases: Record<string, number>[] = [];
    const latencies: number[] = [];
    for (let i = 0; i < repeats; i++) {
      let going = true;
      const probing = (async () => {
        while (going) {
          const start = performance.now();
          await client.get('/surveys?limit=1');
          latencies.push(performance.now() - start);
          await sleep(20);
        }
      })();
      const before = usage(server.process.pid!).cpuSeconds;
      const start = performance.now();
      const spent: Record<string, number> = {};
      let last = start;
      let phase = 'reading';
      const { body } = await client.post(`/surveys/${survey.body.id}/runs`, { criteriaId: criteria.body.id });
      await finished(client, body.jobId as string, (message) => {
        const now = performance.now();
        spent[phase] = (spent[phase] ?? 0) + (now - last) / 1000;
        last = now;
        phase = message.split(' ')[0] || phase;
      });
      going = false;
      await probing;
      spent['whole'] = (performance.now() - start) / 1000;
      spent['processor'] = usage(server.process.pid!).cpuSeconds - before;
      phases.push(spent);
    }
    latencies.sort((a, b) => a - b);
    const of = (name: string) => inSeconds(median(phases.map((one) => one[name] ?? 0)));
    console.log(
      `\nrun on published tables: reading ${of('reading')}, indexing ${of('indexing')}, learning ${of('learning')}, scoring and storing ${of('scoring')}, whole ${of('whole')}, processor ${of('processor')}; peak ${inGiB(usage(server.process.pid!).peakBytes)}; light request p99 ${latencies[Math.floor(0.99 * latencies.length)]!.toFixed(0)} ms of ${latencies.length}`,
    );
  } finally {
    await server.stop();
    rmSync(dataDir, { recursive: true, force: true });
  }
}

const [what, detections = '30000', rows = '1000000', repeats = '3'] = process.argv.slice(2);
const folder = mkdtempSync(join(process.env['EREMITE_BENCH_DIR'] ?? tmpdir(), 'bench-survey-'));
try {
  const plan = writeSurvey(folder, Number(detections), Number(rows));
  writeFileSync(join(folder, 'plan.json'), JSON.stringify(plan));
  console.log(
    `\n${detections} detections, four catalogues of ${rows} rows, ${cpus().length} processors, ${process.version}\n`,
  );
  if (what !== 'run') {
    const head = ['case', 'pairs', 'time', 'processor', 'peak', 'other', 'its peak', 'ratio', 'same number', 'against'];
    console.log(`| ${head.join(' | ')} |\n|${head.map(() => '---').join('|')}|`);
    await benchPlan(folder, Number(repeats));
  }
  if (what !== 'plan') await benchRun(folder, Number(repeats));
} finally {
  rmSync(folder, { recursive: true, force: true });
}
