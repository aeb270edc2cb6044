import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { Link } from 'react-router-dom';
import type { Column } from '#components/data-table/data-table.tsx';
import { DoubtFlags } from '#components/doubt-mark/doubt-mark.tsx';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import {
  count,
  fixed,
  NO_VALUE,
  probability,
  probabilityCell,
  signed,
  significant,
  withError,
} from '#lib/format/number.ts';
import { declination, rightAscension } from '#lib/format/position.ts';

/** Columns that cannot be switched off come first. */
export const FIXED_COLUMNS = ['name', 'starlight', 'surroundings'];
export const DEFAULT_COLUMNS = [
  'velocity',
  'distance',
  'mass',
  'pNone',
  'power',
  'counterpart',
  'pAlone',
  'nearest',
  'doubts',
  'reviews',
];

/** Every column the detections table can show; `to` gives the address of a detection's page. */
export const detectionColumns = (to: (detectionId: string) => string): Column<VerdictItem>[] => [
  {
    key: 'name',
    header: 'Detection',
    align: 'left',
    sort: 'name',
    cell: (v) => <Link to={to(v.detectionId)}>{v.name}</Link>,
  },
  {
    key: 'starlight',
    header: 'Starlight',
    align: 'left',
    sort: 'starlight',
    cell: (v) => (
      <span className="prose">
        <StarlightWord verdict={v.settled?.starlight ?? v.starlight} />
      </span>
    ),
  },
  {
    key: 'surroundings',
    header: 'Surroundings',
    align: 'left',
    sort: 'surroundings',
    cell: (v) => (
      <span className="prose">
        <SurroundingsWord verdict={v.settled?.surroundings ?? v.surroundings} />
      </span>
    ),
  },
  { key: 'ra', header: 'RA', unit: 'ICRS', align: 'left', sort: 'raDeg', cell: (v) => rightAscension(v.raDeg) },
  { key: 'dec', header: 'Dec', unit: 'ICRS', align: 'left', sort: 'decDeg', cell: (v) => declination(v.decDeg) },
  {
    key: 'velocity',
    header: 'cz',
    unit: 'km/s',
    hint: 'Velocity of the gas, optical convention, barycentric.',
    sort: 'velocityKms',
    cell: (v) => fixed(v.velocityKms, 0),
  },
  {
    key: 'width',
    header: 'W50',
    unit: 'km/s',
    hint: 'Line width at half the peak, as in the table.',
    cell: (v) => fixed(v.width50Kms, 0),
  },
  {
    key: 'flux',
    header: 'Flux',
    unit: 'Jy km/s',
    hint: 'Integrated 21-cm flux, as in the table.',
    cell: (v) => significant(v.fluxJyKms, 3),
  },
  { key: 'snr', header: 'S/N', cell: (v) => fixed(v.signalToNoise, 1) },
  {
    key: 'distance',
    header: 'D',
    unit: 'Mpc',
    hint: 'Luminosity distance by the rule of the criteria: measured, else flow model, else Hubble law, else none.',
    sort: 'distanceMpc',
    cell: (v) => withError(v.distanceMpc, v.distanceErrorMpc, 1),
  },
  {
    key: 'mass',
    header: (
      <>
        log M<sub>HI</sub>
      </>
    ),
    unit: 'M☉',
    hint: 'Gas mass from the flux and the distance.',
    sort: 'logHiMass',
    cell: (v) => fixed(v.logHiMass, 2),
  },
  {
    key: 'pNone',
    header: 'P(none)',
    hint: 'Probability that the gas has no stars in these catalogues’ reach.',
    sort: 'pNone',
    cell: (v) => probabilityCell(v.pNone),
  },
  {
    key: 'pMissed',
    header: 'P(missed)',
    hint: 'Probability that it has an ordinary galaxy the catalogues missed.',
    cell: (v) => probabilityCell(v.pMissed),
  },
  {
    key: 'pSpurious',
    header: 'P(spurious)',
    hint: 'Probability that the line itself is not real.',
    cell: (v) => probabilityCell(v.pSpurious),
  },
  {
    key: 'power',
    header: 'Power',
    hint: 'Chance that an ordinary galaxy with this much gas would have been seen here.',
    sort: 'power',
    cell: (v) => probabilityCell(v.power),
  },
  {
    key: 'counterpart',
    header: 'Best object',
    align: 'left',
    hint: 'The object with the highest probability, and that probability, whatever the verdict.',
    cell: (v) =>
      v.counterpart ? (
        <>
          {v.counterpart.name} <span className="muted">{probability(v.counterpart.probability)}</span>
        </>
      ) : (
        NO_VALUE
      ),
  },
  {
    key: 'gasToLight',
    header: (
      <>
        M<sub>HI</sub>/L<sub>r</sub>
      </>
    ),
    unit: 'solar',
    hint: 'Gas mass over light; a lower limit where nothing was found.',
    cell: (v) =>
      v.gasToLight === null ? NO_VALUE : `${v.gasToLightIsLimit ? '>' : ''}${significant(v.gasToLight, 2)}`,
  },
  {
    key: 'pAlone',
    header: 'P(alone)',
    hint: 'P(no neighbour): none known × none unseen × covered.',
    sort: 'pAlone',
    cell: (v) => probabilityCell(v.pAlone),
  },
  {
    key: 'nearest',
    header: 'Nearest',
    unit: 'kpc, km/s',
    hint: 'Nearest galaxy within the velocity window: projected separation and velocity difference.',
    cell: (v) =>
      v.nearest ? `${fixed(v.nearest.separationKpc, 0)}, ${signed(v.nearest.velocityDifferenceKms, 0)}` : NO_VALUE,
  },
  {
    key: 'count',
    header: 'Count',
    unit: '1 Mpc',
    hint: 'Galaxies with a velocity within 1 Mpc and 500 km/s.',
    cell: (v) => count(v.count1Mpc500Kms),
  },
  { key: 'doubts', header: 'Doubts', align: 'left', cell: (v) => <DoubtFlags doubts={v.doubts} /> },
  { key: 'reviews', header: 'Reviews', cell: (v) => (v.settled ? 'settled' : v.reviews || NO_VALUE) },
];
