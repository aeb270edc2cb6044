import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { cpus, tmpdir, totalmem } from 'node:os';
import { join } from 'node:path';
import { BENCH_CASES, type BenchCase, type Timed } from './bench-cases.ts';
import { writeColumns } from './sky-data.ts';

const PYTHON = '/usr/bin/python3';
const SCRIPTS = join(import.meta.dirname, '..');
const REPEATS = 3;
const hasPython = (): boolean => spawnSync(PYTHON, ['-c', 'import astropy, scipy']).status === 0;
const median = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;
const inGiB = (bytes: number): string => `${(bytes / 2 ** 30).toFixed(2)} GiB`;
const inSeconds = (value: number): string => `${value.toFixed(3)} s`;

interface Other {
  seconds: number[];
  peakBytes: number;
  program: string;
  identical: boolean;
}

/** Runs the other program on the same data and compares the pairs, ours brought into its order. */
function runOther({ script, argument, columns }: BenchCase, ours: Timed): Other {
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  try {
    writeColumns(folder, columns);
    const arguments_ = [join(SCRIPTS, script), folder, String(argument), String(REPEATS)];
    const answer = JSON.parse(execFileSync(PYTHON, arguments_, { encoding: 'utf8' })) as Omit<Other, 'identical'>;
    const bytes = readFileSync(join(folder, 'pairs.u32'));
    const theirs = new Uint32Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length));
    const keys = Float64Array.from(ours.first, (first, i) => first * 2 ** 32 + ours.second[i]!).sort();
    const identical =
      theirs.length === 2 * keys.length &&
      keys.every((key, i) => theirs[2 * i]! * 2 ** 32 + theirs[2 * i + 1]! === key);
    return { ...answer, identical };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** Measures one line in this process, so that its peak memory is its own. */
function runCase(name: string): void {
  const bench = BENCH_CASES[name]!();
  bench.once(); // compiled once, as in a running service
  const timed: Timed[] = [];
  for (let i = 0; i < REPEATS; i++) timed.push(bench.once());
  const peakBytes = process.resourceUsage().maxRSS * 1024;
  const index = median(timed.map((t) => t.indexSeconds));
  const search = median(timed.map((t) => t.searchSeconds));
  const total = median(timed.map((t) => t.indexSeconds + t.searchSeconds));
  const other = hasPython() ? runOther(bench, timed[0]!) : undefined;
  const theirs = other && median(other.seconds);
  const line = [
    bench.title,
    timed[0]!.first.length.toLocaleString('en'),
    inSeconds(index),
    inSeconds(search),
    inSeconds(total),
    inGiB(peakBytes),
    theirs === undefined ? 'not there' : inSeconds(theirs),
    other ? inGiB(other.peakBytes) : '',
    theirs === undefined ? '' : `${(theirs / total).toFixed(1)} (aim ${bench.aim})`,
    other ? (other.identical ? 'yes' : 'NO') : '',
    other?.program ?? '',
  ];
  console.log(`| ${line.join(' | ')} |`);
  if (other && !other.identical) process.exitCode = 1;
}

function runAll(names: string[]): void {
  const cpu = cpus();
  console.log(`${cpu.length} x ${cpu[0]!.model.trim()}, ${inGiB(totalmem())}, Node ${process.version}`);
  console.log(`medians of ${REPEATS}; time of this engine = index + search in one thread\n`);
  const head = [
    'case',
    'pairs',
    'index',
    'search',
    'total',
    'peak',
    'other',
    'its peak',
    'ratio',
    'identical',
    'against',
  ];
  console.log(`| ${head.join(' | ')} |\n|${head.map(() => '---').join('|')}|`);
  for (const name of names) {
    const { status } = spawnSync(process.execPath, [process.argv[1]!, '--case', name], { stdio: 'inherit' });
    if (status !== 0) process.exitCode = 1;
  }
}

const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !name.startsWith('--') && !(name in BENCH_CASES));
if (unknown.length > 0) {
  console.error(`no benchmark ${unknown.join(', ')}; there are ${Object.keys(BENCH_CASES).join(', ')}`);
  process.exitCode = 2;
} else if (asked[0] === '--list') console.log(Object.keys(BENCH_CASES).join('\n'));
else if (asked[0] === '--case') runCase(asked[1]!);
else runAll(asked.length > 0 ? asked : Object.keys(BENCH_CASES));
