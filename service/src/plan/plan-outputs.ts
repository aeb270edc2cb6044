import { mkdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { PLAN_OUTPUTS } from '@eremite/shared/contracts/plan';
import { DEGREE } from '@eremite/shared/science/constants';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { rowName } from '../scoring/prepared-catalogue.ts';
import type { Engine } from '../scoring/engine.ts';
import type { ScoredDetection } from '../scoring/scored-detection.ts';
import { CsvFile } from './csv-file.ts';

type Output = (typeof PLAN_OUTPUTS)[number];

const COLUMNS = {
  'verdicts.csv': [
    'detection',
    'starlight',
    'p_none',
    'p_missed',
    'p_spurious',
    'power',
    'counterpart',
    'counterpart_probability',
    'surroundings',
    'p_alone',
    'nearest_name',
    'nearest_kpc',
    'nearest_dv_kms',
    'count_1mpc_500kms',
    'distance_mpc',
    'doubts',
  ],
  'candidates.csv': [
    'detection',
    'catalogue',
    'row',
    'separation_arcsec',
    'position_angle_deg',
    'separation_kpc',
    'dv_kms',
    'p_chance',
    'likelihood_ratio',
    'probability',
  ],
  'neighbours.csv': ['detection', 'catalogue', 'row', 'separation_arcsec', 'separation_kpc', 'dv_kms'],
} as const;

const TEMPORARY = '.unfinished';

/**
 * The files a plan leaves behind. They are written beside their names and moved into place together at the end, so that
 * an interrupted plan leaves nothing that looks finished.
 */
export class PlanOutputs {
  private readonly files = new Map<Output, CsvFile>();
  private readonly written: Output[] = [];
  private readonly made: string | undefined;

  constructor(
    private readonly folder: string,
    private readonly wanted: readonly Output[],
  ) {
    this.made = mkdirSync(folder, { recursive: true });
    for (const name of ['verdicts.csv', 'candidates.csv', 'neighbours.csv'] as const) {
      if (wanted.includes(name)) {
        this.files.set(name, new CsvFile(join(folder, name + TEMPORARY), COLUMNS[name]));
        this.written.push(name);
      }
    }
  }

  add(scored: readonly ScoredDetection[], { detections }: Engine): void {
    const verdicts = this.files.get('verdicts.csv');
    const candidates = this.files.get('candidates.csv');
    const neighbours = this.files.get('neighbours.csv');
    for (const result of scored) {
      const { item } = result;
      const { angularMpc } = detections[result.position]!;
      verdicts?.add(verdictCells(result, angularMpc));
      if (candidates) {
        for (const row of result.candidates) {
          candidates.add([
            item.name,
            row.catalogue.input.name,
            rowName(row.catalogue, row.index),
            row.separationArcsec,
            row.positionAngleRad / DEGREE,
            projectedKpc(row.separationArcsec, angularMpc),
            row.velocityDifferenceKms,
            row.chanceProbability,
            row.likelihoodRatio,
            row.probability,
          ]);
        }
      }
      if (neighbours) {
        for (const row of result.neighbours) {
          neighbours.add([
            item.name,
            row.catalogue.input.name,
            rowName(row.catalogue, row.index),
            row.separationArcsec,
            projectedKpc(row.separationArcsec, angularMpc),
            row.velocityDifferenceKms,
          ]);
        }
      }
    }
  }

  lines(name: 'candidates.csv' | 'neighbours.csv'): number | null {
    return this.files.get(name)?.lines ?? null;
  }

  /** Moves everything into place. */
  finish(summary: unknown): void {
    for (const file of this.files.values()) file.close();
    if (this.wanted.includes('summary.json')) {
      writeFileSync(join(this.folder, `summary.json${TEMPORARY}`), `${JSON.stringify(summary, null, 2)}\n`);
      this.written.push('summary.json');
    }
    for (const name of this.written) renameSync(join(this.folder, name + TEMPORARY), join(this.folder, name));
  }

  /** Takes away what was begun. */
  discard(): void {
    for (const file of this.files.values()) {
      try {
        file.close();
      } catch {
        // Already closed, or the disk is full: either way the file goes.
      }
    }
    for (const name of this.wanted) rmSync(join(this.folder, name + TEMPORARY), { force: true });
    if (this.made) rmSync(this.made, { recursive: true, force: true });
  }
}

function verdictCells({ item }: ScoredDetection, angularMpc: number) {
  return [
    item.name,
    item.starlight,
    item.pNone,
    item.pMissed,
    item.pSpurious,
    item.power,
    item.counterpart?.name ?? '',
    item.counterpart?.probability ?? null,
    item.surroundings,
    item.pAlone,
    item.nearest?.name ?? '',
    item.nearest?.separationKpc ?? null,
    item.nearest?.velocityDifferenceKms ?? null,
    item.count1Mpc500Kms,
    angularMpc > 0 ? item.distanceMpc : null,
    item.doubts.map(({ name, grade }) => `${name}: ${grade}`).join('; '),
  ];
}
