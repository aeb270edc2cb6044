import type { List } from '@eremite/shared/contracts/list';
import type { evidenceQuery } from '@eremite/shared/contracts/run';
import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import { Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { decodeCursor, encodeCursor } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { readCandidates, readNeighbours, type EvidenceCatalogue } from '../../scoring/evidence.ts';
import type { OutputColumn } from '../../tables/writers/output-column.ts';
import { RunsService } from './runs.service.ts';
import type { TableAnswer } from './send-table.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

type Query = z.output<typeof evidenceQuery>;
type Which = 'candidates' | 'neighbours';
type Found<T> = T & { detectionId: string; detection: string };
/** Detections whose packed evidence is read at a time. */
const BATCH = 200;

/** The flat lists of all candidates or neighbours of a run. */
@Injectable()
export class EvidenceService {
  constructor(
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsRepository,
  ) {}

  candidates(user: SignedInUser, runId: string, query: Query): Promise<List<Found<Omit<Candidate, 'override'>>>> {
    return this.#page(user, runId, 'candidates', readCandidates, query);
  }

  neighbours(user: SignedInUser, runId: string, query: Query): Promise<List<Found<Neighbour>>> {
    return this.#page(user, runId, 'neighbours', readNeighbours, query);
  }

  async #page<T>(
    user: SignedInUser,
    runId: string,
    which: Which,
    read: (packed: Uint8Array, tables: readonly EvidenceCatalogue[]) => T[],
    query: Query,
  ) {
    const run = await this.runs.get(user, runId);
    // A place is (detection in input order, entry within it): entries of one detection are never split over a read.
    const [start = 0, skip = 0] = (decodeCursor(query.cursor) ?? []) as number[];
    const items: Found<T>[] = [];
    let place = [start, skip];
    let more = true;
    while (items.length < query.limit && more) {
      const rows = await this.verdicts.evidence(runId, which, { limit: BATCH, offset: place[0]! }, query.detectionId);
      more = rows.length === BATCH;
      for (const row of rows) {
        const found = read(row.packed, run.inputs);
        const fresh = found.slice(place[1]!);
        const taken = fresh.slice(0, query.limit - items.length);
        items.push(...taken.map((entry) => ({ detectionId: row.detectionId, detection: row.name, ...entry })));
        if (taken.length < fresh.length) {
          more = true;
          place = [place[0]!, place[1]! + taken.length];
          break;
        }
        place = [place[0]! + 1, 0];
      }
    }
    const total = query.detectionId ? items.length + skip : ((run.counts?.[which] as number | undefined) ?? 0);
    return { items, total, nextCursor: more && items.length > 0 ? encodeCursor(place) : null };
  }

  async #lines<T>(
    user: SignedInUser,
    runId: string,
    which: Which,
    read: (packed: Uint8Array, tables: readonly EvidenceCatalogue[]) => T[],
    detectionId?: string,
  ) {
    const run = await this.runs.get(user, runId);
    const verdicts = this.verdicts;
    async function* lines(): AsyncIterable<{ detection: string; entry: T }> {
      for (let offset = 0; ; offset += BATCH) {
        const rows = await verdicts.evidence(runId, which, { limit: BATCH, offset }, detectionId);
        for (const row of rows) for (const entry of read(row.packed, run.inputs)) yield { detection: row.name, entry };
        if (rows.length < BATCH) return;
      }
    }
    return { run, lines: lines() };
  }

  async candidateTable(user: SignedInUser, runId: string, detectionId?: string): Promise<TableAnswer> {
    const { run, lines } = await this.#lines(user, runId, 'candidates', readCandidates, detectionId);
    async function* rows() {
      for await (const { detection, entry: c } of lines) {
        yield [
          detection,
          c.catalogueName,
          c.name,
          c.rowId,
          c.raDeg,
          c.decDeg,
          c.separationArcsec,
          c.positionAngleDeg,
          c.separationKpc,
          c.velocityKms,
          c.velocityDifferenceKms,
          c.band,
          c.magnitude,
          c.chanceProbability,
          c.likelihoodRatio,
          c.probability,
          c.object,
        ];
      }
    }
    return { columns: CANDIDATE_COLUMNS, rows: rows(), description: `Candidates of run ${run.number}` };
  }

  async neighbourTable(user: SignedInUser, runId: string, detectionId?: string): Promise<TableAnswer> {
    const { run, lines } = await this.#lines(user, runId, 'neighbours', readNeighbours, detectionId);
    async function* rows() {
      for await (const { detection, entry: n } of lines) {
        yield [
          detection,
          n.catalogueName,
          n.name,
          n.rowId,
          n.raDeg,
          n.decDeg,
          n.separationArcsec,
          n.positionAngleDeg,
          n.separationKpc,
          n.velocityKms,
          n.velocityDifferenceKms,
          n.band,
          n.magnitude,
          n.absoluteMagnitude,
          n.logHiMass,
          n.qualifies,
        ];
      }
    }
    return { columns: NEIGHBOUR_COLUMNS, rows: rows(), description: `Neighbours of run ${run.number}` };
  }
}

const text = (name: string, description: string): OutputColumn => ({ name, datatype: 'text', description });
const number = (name: string, unit: string | undefined, decimals: number, description: string): OutputColumn => ({
  name,
  datatype: 'double',
  unit,
  decimals,
  description,
});
const PLACE: OutputColumn[] = [
  text('detection', 'Name in the HI list'),
  text('catalogue', 'Table of the row'),
  text('row', 'Name of the row, or its number in the file'),
  { name: 'row_number', datatype: 'integer', description: 'Number of the row in its file' },
  number('ra_deg', 'deg', 6, 'Right ascension, ICRS'),
  number('dec_deg', 'deg', 6, 'Declination, ICRS'),
  number('separation_arcsec', 'arcsec', 2, 'From the HI centroid'),
  number('position_angle_deg', 'deg', 1, 'Of the row seen from the centroid, north through east'),
  number('separation_kpc', 'kpc', 2, 'Projected at the distance of the gas'),
  number('cz_kms', 'km/s', 1, 'Velocity, optical convention, barycentric'),
  number('dv_kms', 'km/s', 1, 'Difference of cz over 1 + z of the detection'),
  text('band', 'Band of the magnitude'),
  number('magnitude', 'mag', 3, 'As in the catalogue'),
];
const CANDIDATE_COLUMNS: OutputColumn[] = [
  ...PLACE,
  {
    name: 'p_chance',
    datatype: 'double',
    description: 'Chance that an unrelated object as bright lies this near (Downes et al. 1986)',
  },
  { name: 'likelihood_ratio', datatype: 'double', description: 'Sutherland & Saunders (1992)' },
  number('probability', undefined, 4, 'Exclusive probability of the object the row belongs to'),
  { name: 'object', datatype: 'integer', description: 'Rows with the same number are one object' },
];
const NEIGHBOUR_COLUMNS: OutputColumn[] = [
  ...PLACE,
  number('absolute_magnitude', 'mag', 2, 'At the distance of the gas'),
  number('log_mhi', 'log(solMass)', 2, 'HI mass where the row is an HI detection'),
  { name: 'qualifies', datatype: 'boolean', description: 'Bright or gas-rich enough to decide the verdict' },
];
