import { Button } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { BandFacts, IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { MagnitudeHistogram } from '#components/magnitude-histogram/magnitude-histogram.tsx';
import { fixed } from '#lib/format/number.ts';
import { readAssignment } from '../hooks/column-assignment.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField, NumberField } from './field.tsx';

const EXTINCTION = {
  none: 'not corrected',
  column: 'by the reddening column',
  'already-corrected': 'already corrected',
} as const;

/** Per band: the system, how deep it reaches, the seeing. Without a depth its silence proves nothing. */
export function BandFields({ intake, draft, change }: { intake: Intake; draft: IntakeSettings; change: Change }) {
  const names = Object.values(readAssignment(intake.columns, draft)).flatMap((role) =>
    role?.startsWith('magnitude:') ? [role.slice(10)] : [],
  );
  const bands = draft.bands ?? [];
  const set = (name: string, patch: Partial<BandFacts>) => {
    const merged = { ...(bands.find((band) => band.name === name) ?? { name }), ...patch };
    const clean = Object.fromEntries(Object.entries(merged).filter(([, value]) => value !== undefined)) as BandFacts;
    change({ bands: [...bands.filter((band) => band.name !== name), clean] });
  };
  if (names.length === 0) return <p className="muted">No column is taken for a magnitude.</p>;
  return (
    <div className="stack">
      {names.map((name) => {
        const band = bands.find((entry) => entry.name === name);
        const counts = intake.magnitudes.find((entry) => entry.band === name);
        const turnover = counts?.suggestedDepth?.magnitude;
        return (
          <div key={name} className="band" data-pointer="/bands">
            <fieldset className="band-fields">
              <legend className="mono">{name}</legend>
              <ChoiceField
                label="System"
                value={band?.system}
                choices={{ AB: 'AB', Vega: 'Vega' }}
                onChange={(system) => set(name, { system })}
              />
              <NumberField
                label="Depth, 5 sigma"
                unit="mag, point source"
                value={band?.depth5Sigma}
                onChange={(depth5Sigma) => set(name, { depth5Sigma })}
              />
              <NumberField
                label="Seeing"
                unit="arcsec FWHM"
                value={band?.seeingFwhmArcsec}
                min={0}
                onChange={(seeingFwhmArcsec) => set(name, { seeingFwhmArcsec })}
              />
              <ChoiceField
                label="Extinction"
                value={band?.extinction}
                choices={EXTINCTION}
                onChange={(extinction) => set(name, { extinction })}
              />
            </fieldset>
            {counts && (
              <div className="band__counts">
                <MagnitudeHistogram band={{ ...counts, depth5Sigma: band?.depth5Sigma ?? null }} />
                <div>
                  {turnover === undefined ? (
                    <p className="muted small">
                      The counts show no turn-over (too few, or limited by something else): the depth has to come from
                      elsewhere.
                    </p>
                  ) : (
                    <>
                      <p className="muted small">
                        Where the counts turn over the list begins to lose objects. That is near its depth, but it is no
                        5-sigma limit: take it only where nothing better is known, and correct it as you see fit.
                      </p>
                      <Button
                        size="small"
                        text={`Take ${fixed(turnover, 1)} as the depth`}
                        onClick={() => set(name, { depth5Sigma: Math.round(turnover * 10) / 10 })}
                      />
                    </>
                  )}
                </div>
              </div>
            )}
          </div>
        );
      })}
    </div>
  );
}
