import type { BandLimit } from '@eremite/shared/contracts/verdict';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { fixed, NO_VALUE, probability, significant } from '#lib/format/number.ts';

const extended = (limit: BandLimit) =>
  limit.depthExtended.find(({ radiusArcsec }) => radiusArcsec >= 10) ?? limit.depthExtended.at(-1);

const seen = (limit: BandLimit) =>
  limit.testable ? (
    <span className="seen">
      <span className="seen__track" aria-hidden="true">
        <span style={{ width: `${(limit.completeness ?? 0) * 100}%` }} />
      </span>
      {probability(limit.completeness)}
    </span>
  ) : (
    <span className="prose muted limit-reason">{limit.reason || 'not testable here'}</span>
  );

const COLUMNS: Column<BandLimit>[] = [
  {
    key: 'band',
    header: 'Band',
    align: 'left',
    cell: (l) => (
      <span title={l.catalogueName}>
        {l.band} <span className="muted">{l.system}</span>
      </span>
    ),
  },
  {
    key: 'depth',
    header: 'Point',
    unit: 'mag',
    hint: '5-sigma depth for point sources.',
    cell: (l) => fixed(l.depthPoint, 1),
  },
  {
    key: 'extended',
    header: 'Extended',
    unit: 'mag, size',
    hint: 'Total magnitude reached for a galaxy of the effective radius given.',
    cell: (l) => {
      const limit = extended(l);
      return limit ? `${fixed(limit.magnitude, 1)}, ${limit.radiusArcsec}″` : NO_VALUE;
    },
  },
  {
    key: 'expected',
    header: 'Expected',
    unit: 'mag',
    hint: 'Magnitude of an ordinary galaxy with this much gas at this distance.',
    cell: (l) =>
      l.expectedMagnitude === null ? NO_VALUE : `${fixed(l.expectedMagnitude, 1)} ± ${fixed(l.expectedScatterMag, 1)}`,
  },
  {
    key: 'unmasked',
    header: 'Unmasked',
    hint: 'Share of the search area not under a mask.',
    cell: (l) => probability(l.unmasked),
  },
  {
    key: 'seen',
    header: 'Would be seen',
    align: 'left',
    hint: 'Chance that the ordinary galaxy would be in the catalogue.',
    cell: seen,
  },
];

const PHYSICAL: Column<BandLimit>[] = [
  COLUMNS[0]!,
  {
    key: 'covered',
    header: 'Covered',
    hint: 'Share of the search area observed.',
    cell: (l) => probability(l.covered),
  },
  {
    key: 'extinction',
    header: 'A',
    unit: 'mag',
    hint: 'Extinction in the band.',
    cell: (l) => fixed(l.extinctionMag, 2),
  },
  { key: 'absolute', header: 'M limit', unit: 'mag', cell: (l) => fixed(l.absoluteMagnitudeLimit, 1) },
  { key: 'light', header: 'L limit', unit: 'L☉', cell: (l) => significant(l.luminosityLimitSolar, 2) },
  {
    key: 'ratio',
    header: (
      <>
        M<sub>HI</sub>/L above
      </>
    ),
    unit: 'solar',
    cell: (l) => significant(l.gasToLightLowerLimit, 2),
  },
  {
    key: 'stars',
    header: (
      <>
        log M<sub>*</sub> below
      </>
    ),
    unit: 'M☉ at M/L',
    cell: (l) =>
      l.stellarMassLimits.map(({ logMass, massToLight }) => `${fixed(logMass, 1)} (${massToLight})`).join('  ') ||
      NO_VALUE,
  },
  { key: 'sfr', header: 'SFR below', unit: 'M☉/yr', cell: (l) => significant(l.starFormationLimit, 2) },
];

const key = (limit: BandLimit) => `${limit.catalogueId}:${limit.band}`;

/** How deep each band reaches here and whether an ordinary galaxy would have been seen. */
export const DepthTable = ({ limits }: { limits: readonly BandLimit[] }) => (
  <DataTable caption="What each band would have seen here" columns={COLUMNS} rows={limits} rowKey={key} />
);

/** The same silence in physical terms. */
export const LimitTable = ({ limits }: { limits: readonly BandLimit[] }) => (
  <DataTable caption="Limits on light, stars and star formation" columns={PHYSICAL} rows={limits} rowKey={key} />
);
