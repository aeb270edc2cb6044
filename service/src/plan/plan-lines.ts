import type { PLAN_OUTPUTS } from '@eremite/shared/contracts/plan';
import { DEGREE } from '@eremite/shared/science/constants';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { rowName } from '../scoring/prepared-catalogue.ts';
import type { ScoredDetection } from '../scoring/scored-detection.ts';
import { type Cell, csvLine } from './csv-line.ts';

export type PlanOutput = (typeof PLAN_OUTPUTS)[number];
export type PlanTableFile = Exclude<PlanOutput, 'summary.json'>;

export const PLAN_COLUMNS: Record<PlanTableFile, readonly string[]> = {
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
};

/** What a unit of scored detections adds to the outputs of a plan. */
export interface PlanUnit {
  /** Lines of the files that are wanted. */
  text: Partial<Record<PlanTableFile, string>>;
  starlight: Record<string, number>;
  surroundings: Record<string, number>;
  detections: number;
  candidates: number;
  neighbours: number;
}

const CELLS: Record<PlanTableFile, (scored: ScoredDetection) => Iterable<readonly Cell[]>> = {
  'verdicts.csv': (scored) => [verdictCells(scored)],
  'candidates.csv': ({ item, candidates, detection: { angularMpc } }) =>
    candidates.map((row) => [
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
    ]),
  'neighbours.csv': ({ item, neighbours, detection: { angularMpc } }) =>
    neighbours.map((row) => [
      item.name,
      row.catalogue.input.name,
      rowName(row.catalogue, row.index),
      row.separationArcsec,
      projectedKpc(row.separationArcsec, angularMpc),
      row.velocityDifferenceKms,
    ]),
};

export function planUnit(scored: readonly ScoredDetection[], wanted: readonly PlanOutput[]): PlanUnit {
  const unit: PlanUnit = {
    text: {},
    starlight: {},
    surroundings: {},
    detections: scored.length,
    candidates: 0,
    neighbours: 0,
  };
  for (const name of wanted) {
    if (name === 'summary.json') continue;
    let text = '';
    for (const one of scored) for (const cells of CELLS[name](one)) text += csvLine(cells);
    unit.text[name] = text;
  }
  for (const { item, candidates, neighbours } of scored) {
    unit.starlight[item.starlight] = (unit.starlight[item.starlight] ?? 0) + 1;
    unit.surroundings[item.surroundings] = (unit.surroundings[item.surroundings] ?? 0) + 1;
    unit.candidates += candidates.length;
    unit.neighbours += neighbours.length;
  }
  return unit;
}

function verdictCells({ item, detection: { angularMpc } }: ScoredDetection): Cell[] {
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
