import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField, NumberField } from './field.tsx';

const FRAMES = { icrs: 'ICRS', fk5: 'FK5, J2000', fk4: 'FK4, B1950', galactic: 'Galactic' } as const;
const CONVENTIONS = { optical: 'optical', radio: 'radio', relativistic: 'relativistic' } as const;
const VELOCITY_FRAMES = { barycentric: 'barycentric', lsrk: 'LSRK', 'local-group': 'Local Group', cmb: 'CMB' } as const;
const ERRORS = {
  sigma1d: '1 sigma on each axis',
  meanRadial: 'mean radial offset',
  radial68: 'radius holding 68 %',
  radial90: 'radius holding 90 %',
  radial95: 'radius holding 95 %',
} as const;

/** What the numbers mean: frames, conventions, errors, the beam. What is left unsaid is assumed aloud. */
export function MeaningFields({ draft, change }: { draft: IntakeSettings; change: Change }) {
  const { velocity, beamArcsec: beam, kind } = draft;
  const isGas = kind === 'hi';
  const setBeam = (part: Partial<NonNullable<typeof beam>>) => {
    const next = { major: beam?.major, minor: beam?.minor, angleDeg: beam?.angleDeg, ...part };
    const major = next.major ?? next.minor;
    if (!major) return change({ beamArcsec: undefined });
    return change({
      beamArcsec: {
        major,
        minor: next.minor ?? major,
        ...(next.angleDeg === undefined ? {} : { angleDeg: next.angleDeg }),
      },
    });
  };
  return (
    <div className="columns field-grid">
      <ChoiceField
        label="Frame of the positions"
        pointer="/frame"
        value={draft.frame}
        choices={FRAMES}
        onChange={(frame) => change({ frame })}
      />
      <ChoiceField
        label="Velocity convention"
        pointer="/velocity"
        value={velocity?.convention}
        choices={CONVENTIONS}
        onChange={(convention) => change({ velocity: { ...velocity, convention } })}
      />
      <ChoiceField
        label="Velocity frame"
        pointer="/velocity/frame"
        value={velocity?.frame}
        choices={VELOCITY_FRAMES}
        onChange={(frame) => change({ velocity: { ...velocity, frame } })}
      />
      <ChoiceField
        label="Meaning of the position error"
        pointer="/errorMeaning"
        value={draft.errorMeaning}
        choices={ERRORS}
        onChange={(errorMeaning) => change({ errorMeaning })}
      />
      <NumberField
        label="Position error"
        pointer="/positionErrorArcsec"
        unit="arcsec"
        help="For all rows, where the table has no column for it."
        value={draft.positionErrorArcsec}
        min={0}
        onChange={(positionErrorArcsec) => change({ positionErrorArcsec })}
      />
      {isGas && (
        <>
          <NumberField
            label="Beam, major axis"
            pointer="/beamArcsec"
            unit="arcsec FWHM"
            value={beam?.major}
            min={0}
            onChange={(major) => setBeam({ major })}
          />
          <NumberField
            label="Beam, minor axis"
            unit="arcsec FWHM"
            value={beam?.minor}
            min={0}
            onChange={(minor) => setBeam({ minor })}
          />
          <NumberField
            label="Beam angle"
            unit="deg, N through E"
            value={beam?.angleDeg}
            onChange={(angleDeg) => setBeam({ angleDeg })}
          />
        </>
      )}
      <ChoiceField
        label="Kind of the distance column"
        pointer="/distanceKind"
        value={draft.distanceKind}
        choices={{ angular: 'as given, for projection', luminosity: 'luminosity distance' }}
        onChange={(distanceKind) => change({ distanceKind })}
      />
    </div>
  );
}
