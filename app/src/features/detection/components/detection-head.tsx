import { Button } from '@blueprintjs/core';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { fixed, significant, withError } from '#lib/format/number.ts';
import { declination, rightAscension } from '#lib/format/position.ts';
import { rayleighRadius } from '@eremite/shared/drawing/panel-plane';

const KIND = { measured: 'measured', flow: 'flow model', hubble: 'Hubble law', none: '' } as const;

interface DetectionHeadProps {
  detail: VerdictDetail;
  /** Opens the dialog that replaces the distance; absent for those who may not. */
  onDistance?: (() => void) | undefined;
}

/** Who the detection is: position with its error, line, distance, gas mass. */
export function DetectionHead({ detail, onDistance }: DetectionHeadProps) {
  const { verdict: v, distance, positionError } = detail;
  const r68 = rayleighRadius(0.6827) * Math.sqrt(positionError.majorArcsec * positionError.minorArcsec);
  const far = distance.luminosityMpc === null ? 'not usable' : withError(distance.luminosityMpc, distance.errorMpc, 1);
  return (
    <header className="det-head">
      <h1 className="mono">{v.name}</h1>
      <p className="mono det-head__place">
        {rightAscension(v.raDeg)} {declination(v.decDeg)}{' '}
        <span className="muted">
          ICRS, 68 % {fixed(r68, 0)}″{v.signalToNoise !== null && `, S/N ${fixed(v.signalToNoise, 0)}`}
        </span>
      </p>
      <dl className="det-head__line">
        <Fact term="cz" value={fixed(v.velocityKms, 0)} unit="km/s" />
        <Fact term="W50" value={fixed(v.width50Kms, 0)} unit="km/s" />
        <Fact term="flux" value={significant(v.fluxJyKms, 2)} unit="Jy km/s" />
        <div title={distance.note}>
          <dt>D</dt>
          <dd>
            {far} {distance.luminosityMpc !== null && <span className="muted">Mpc, {KIND[distance.kind]}</span>}
            {onDistance && <Button size="small" variant="minimal" text="change" onClick={onDistance} />}
          </dd>
        </div>
        <Fact
          term={
            <>
              log M<sub>HI</sub>
            </>
          }
          value={fixed(v.logHiMass, 2)}
          unit="M☉"
        />
      </dl>
    </header>
  );
}

const Fact = ({ term, value, unit }: { term: React.ReactNode; value: string; unit: string }) => (
  <div>
    <dt>{term}</dt>
    <dd>
      {value} <span className="muted">{unit}</span>
    </dd>
  </div>
);
