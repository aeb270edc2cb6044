import { criteriaSettings, type CriteriaSettingsInput } from '@eremite/shared/contracts/criteria';
import { DEGREE } from '@eremite/shared/science/constants';
import { polygonsFootprint } from '@eremite/shared/science/sky/footprint';
import type { EngineCatalogue, EngineCoverage, EngineInput } from '@eremite/service/scoring/engine-input.ts';
import { runEngine } from '@eremite/service/scoring/run-engine.ts';
import type { ScoredDetection } from '@eremite/service/scoring/scored-detection.ts';
import { DEPTHS, type DrawnUniverse, drawUniverse, type GalaxyRow } from '../../testdata/closed-loop/draw-universe.ts';
import type { Assumptions } from '../../testdata/closed-loop/assumptions.ts';

/** A drawn universe scored by the engine itself, without files, server or database. */
export interface ClosedLoop {
  universe: DrawnUniverse;
  scored: ScoredDetection[];
  notes: string[];
}

export async function closeLoop(assumptions: Assumptions, criteria: CriteriaSettingsInput = {}): Promise<ClosedLoop> {
  const universe = drawUniverse(assumptions);
  const scored: ScoredDetection[] = [];
  const input = inputOf(universe, {
    ...criteria,
    robustness: { draws: 0 },
    control: { offsetsPerSource: 0 },
  });
  const { notes } = await runEngine(input, (some) => void scored.push(...some));
  return { universe, scored, notes };
}

function inputOf(universe: DrawnUniverse, criteria: CriteriaSettingsInput): EngineInput {
  const { detections, brightStars, halves, beamArcsec } = universe;
  const base = {
    hash: '',
    bands: [],
    beamArcsec: null,
    positionErrorArcsec: null,
    distanceKind: 'angular' as const,
    redshiftDepth: null,
    coverage: null,
    coverageNote: '',
  };
  const column = <T>(rows: readonly T[], of: (row: T) => number) => Float64Array.from(rows, of);
  const places = (rows: readonly { raDeg: number; decDeg: number }[]) => ({
    row: Uint32Array.from(rows, (_, i) => i + 1),
    raDeg: column(rows, ({ raDeg }) => raDeg),
    decDeg: column(rows, ({ decDeg }) => decDeg),
  });
  const hi: EngineCatalogue = {
    ...base,
    id: 'hi',
    name: 'gas',
    kind: 'hi',
    beamArcsec: { major: beamArcsec, minor: beamArcsec, angleDeg: 0 },
    roles: {
      rows: detections.length,
      columns: {
        ...places(detections),
        czKms: column(detections, ({ czKms }) => czKms),
        width50Kms: column(detections, ({ width50Kms }) => width50Kms),
        fluxJyKms: column(detections, ({ fluxJyKms }) => fluxJyKms),
        signalToNoise: column(detections, ({ signalToNoise }) => signalToNoise),
        distanceMpc: column(detections, ({ distanceMpc }) => distanceMpc),
        distanceErrorMpc: column(detections, ({ distanceMpc }) => 0.02 * distanceMpc),
      },
    },
  };
  const galaxies = (side: 'west' | 'east', rows: readonly GalaxyRow[]): EngineCatalogue => ({
    ...base,
    id: side,
    name: side,
    kind: 'optical',
    positionErrorArcsec: 0.2,
    bands: [
      {
        name: 'r',
        system: 'AB',
        depth5Sigma: DEPTHS[side],
        seeingFwhmArcsec: universe.seeingArcsec,
        extinction: 'already-corrected',
      },
    ],
    redshiftDepth: { band: 'r', magnitude: 17.8 },
    coverage: coverageOf(halves[side]),
    roles: {
      rows: rows.length,
      columns: {
        ...places(rows),
        czKms: column(rows, ({ czKms }) => czKms),
        effectiveRadiusArcsec: column(rows, ({ radiusArcsec }) => radiusArcsec),
        'mag:r': column(rows, ({ r }) => r),
      },
    },
  });
  const stars: EngineCatalogue = {
    ...base,
    id: 'stars',
    name: 'bright stars',
    kind: 'stars',
    bands: [{ name: 'G', system: 'AB', depth5Sigma: null, seeingFwhmArcsec: null, extinction: 'none' }],
    roles: {
      rows: brightStars.length,
      columns: { ...places(brightStars), 'mag:G': column(brightStars, ({ g }) => g) },
    },
  };
  return {
    survey: { h0: 70, omegaM: 0.3 },
    criteria: criteriaSettings.parse(criteria),
    catalogues: [hi, galaxies('west', universe.west), galaxies('east', universe.east), stars],
    decisions: { overrides: [], distances: [] },
  };
}

function coverageOf(corners: readonly [number, number][]): EngineCoverage {
  const { region } = polygonsFootprint([corners.map(([ra, dec]) => ({ lon: ra * DEGREE, lat: dec * DEGREE }))]);
  return { order: region.order, ranges: Float64Array.from(region.ranges) };
}
