import { createReadStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import type { ReplayResult } from '@eremite/shared/contracts/edition';
import { Moc } from '@eremite/shared/science/sky/moc';
import { readCatalogue } from '../../intake/read-table.ts';
import { SettingsError } from '../../intake/resolved.ts';
import { engineCatalogue } from '../../scoring/engine-catalogue.ts';
import type { EngineCatalogue } from '../../scoring/engine-input.ts';
import { packCandidates, packNeighbours } from '../../scoring/evidence.ts';
import { runEngine } from '../../scoring/run-engine.ts';
import type { ScoredDetection } from '../../scoring/scored-detection.ts';
import { SCORING_VERSION } from '../../scoring/version.ts';
import { TableError } from '../../tables/table.ts';
import { fileSource } from '../../tables/bytes/byte-source.ts';
import { canonicalJson } from '../canonical-json.ts';
import { ArchiveError } from './archive-error.ts';
import { differenceOf } from './difference-of.ts';
import { type ReadManifest, RESULTS, type ResultLine } from './manifest.ts';
import { hashOf, readArchive } from './read-archive.ts';
import { sha256 } from './sha256.ts';

/** Differences told; further ones are counted. */
const TOLD = 50;
/** Verdicts named that have the same difference. */
const NAMED = 5;
/** Share of the work that reading takes, for the progress. */
const READING = 0.4;

/**
 * Repeats an edition from the inputs in its archive: reads its tables anew, scores anew, and compares every verdict with
 * all its numbers, candidates and neighbours.
 *
 * @throws {ArchiveError} when a file is not what it was, before anything is computed
 */
export async function replay(
  path: string,
  onProgress: (fraction: number, message: string) => void = () => undefined,
): Promise<ReplayResult> {
  const folder = await mkdtemp(join(tmpdir(), 'eremite-replay-'));
  try {
    onProgress(0, 'unpacking and checking the archive');
    const manifest = await readArchive(path, folder);
    const catalogues = await readInputs(manifest, folder, (fraction, message) =>
      onProgress(READING * fraction, message),
    );
    return await compare(manifest, catalogues, folder, onProgress);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function readInputs(
  { inputs }: ReadManifest,
  folder: string,
  onProgress: (fraction: number, message: string) => void,
): Promise<EngineCatalogue[]> {
  const catalogues: EngineCatalogue[] = [];
  for (const [i, input] of inputs.entries()) {
    const { name, settings, files, contentHash, catalogueId } = input;
    onProgress(i / inputs.length, `reading ${name}`);
    const [table, ...others] = files.map((file) => ({ ...file, path: join(folder, file.path) }));
    const readMe = others.find(({ role }) => role === 'readMe');
    const parts = others.filter(({ role }) => role === 'part');
    try {
      const { roles, resolved, coverage } = await readCatalogue(table!.path, settings, {
        ...(readMe && { readMe: await fileSource(readMe.path) }),
        ...(parts.length > 0 && { parts: await Promise.all(parts.map((part) => fileSource(part.path))) }),
      });
      const hashes = await Promise.all(
        [table!, ...others].map(async (file) => `${(await hashOf(file.path)).sha256}\n`),
      );
      if (sha256(hashes.join('') + canonicalJson(resolved)) !== contentHash) {
        throw new ArchiveError(
          `This version of Eremite understands the settings of ${name} differently; use the version that froze the edition.`,
        );
      }
      // As the service keeps a region, so that both hand the engine the very same.
      const region = coverage.moc ? Moc.parse(coverage.moc.toAscii()) : null;
      catalogues.push(
        engineCatalogue({ id: catalogueId, hash: contentHash }, { ...resolved, name }, roles, {
          region: region && { order: region.order, ranges: region.ranges },
          note: coverage.note,
        }),
      );
    } catch (error) {
      if (error instanceof SettingsError || error instanceof TableError) {
        throw new ArchiveError(`${name} can no longer be read: ${error.message}`);
      }
      throw error;
    }
  }
  return catalogues;
}

async function compare(
  manifest: ReadManifest,
  catalogues: EngineCatalogue[],
  folder: string,
  onProgress: (fraction: number, message: string) => void,
): Promise<ReplayResult> {
  const { survey, criteria, decisions, run } = manifest;
  const lines = createInterface({ input: createReadStream(join(folder, RESULTS)), crlfDelay: Infinity });
  const frozen = lines[Symbol.asyncIterator]();
  // The same difference of many verdicts is told once.
  const found = new Map<string, { count: number; names: string[] }>();
  let differing = 0;
  let detections = 0;
  const tell = (name: string, what: string | null) => {
    if (what === null) return;
    differing++;
    const same = found.get(what) ?? { count: 0, names: [] };
    found.set(what, same);
    same.count++;
    if (same.names.length < NAMED) same.names.push(name);
  };
  await runEngine(
    { survey: survey.cosmology, criteria: criteria.settings, catalogues, decisions },
    async (scored) => {
      for (const one of scored) {
        detections++;
        const next = await frozen.next();
        const before = next.done ? null : (JSON.parse(next.value) as ResultLine);
        tell(one.item.name, differenceOf(before, resultLine(one)));
      }
    },
    { onProgress: (fraction, message) => onProgress(READING + (1 - READING) * fraction, message) },
  );
  for (let next = await frozen.next(); !next.done; next = await frozen.next()) {
    const { item } = JSON.parse(next.value) as ResultLine;
    tell(String(item['name']), 'is no longer a detection');
  }
  lines.close();
  const versions =
    run.scoringVersion === SCORING_VERSION
      ? ''
      : ` The edition was frozen by ${run.scoringVersion}, this is ${SCORING_VERSION}.`;
  return {
    identical: differing === 0,
    detections,
    differences: sentencesOf(found),
    sentence:
      differing === 0
        ? `Identical: all ${detections} verdicts of run ${run.number} come out again, number for number.${versions}`
        : `${differing} of ${detections} verdicts of run ${run.number} differ.${versions}`,
  };
}

function sentencesOf(found: ReadonlyMap<string, { count: number; names: string[] }>): string[] {
  const told = [...found].slice(0, TOLD).map(([what, { count, names }]) => {
    const more = count > names.length ? ` and ${count - names.length} more` : '';
    return `${names.join(', ')}${more}: ${what}`;
  });
  return found.size > TOLD ? [...told, `and ${found.size - TOLD} other differences`] : told;
}

/** A scored detection as an archive keeps it. */
export function resultLine(one: ScoredDetection): ResultLine {
  return {
    catalogueId: one.catalogueId,
    row: one.row,
    item: JSON.parse(JSON.stringify(one.item)) as Record<string, unknown>,
    detail: JSON.parse(JSON.stringify(one.detail())) as Record<string, unknown>,
    candidatesSha256: sha256(packCandidates(one.candidates, one.detection)),
    neighboursSha256: sha256(packNeighbours(one.neighbours, one.detection)),
  };
}
