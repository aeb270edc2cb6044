import type { Intake } from '@eremite/shared/contracts/intake';
import type { FOOTPRINT_TYPES, IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useState } from 'react';
import { CoverageMap } from '#components/coverage-map/coverage-map.tsx';
import { significant } from '#lib/format/number.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField, NumberField } from './field.tsx';
import { FootprintText, type WrittenFootprint } from './footprint-text.tsx';

const FOOTPRINTS: Record<(typeof FOOTPRINT_TYPES)[number], string> = {
  unknown: 'unknown',
  rows: 'where the rows are',
  moc: 'a MOC',
  circles: 'circles',
  cones: 'cones around the detections',
  polygons: 'polygons',
  'all-sky': 'the whole sky',
};
const FIRST_CONE_ARCSEC = 120;

const isWritten = (type: string | undefined): type is WrittenFootprint =>
  type === 'moc' || type === 'circles' || type === 'polygons';

interface FootprintFieldsProps {
  intake: Intake;
  draft: IntakeSettings;
  change: Change;
  isChecking: boolean;
}

/** Where the table has looked, said in one of several ways, and drawn as it will be published. */
export function FootprintFields({ intake, draft, change, isChecking }: FootprintFieldsProps) {
  // A region that is written down begins to count once there is something of it.
  const [begun, setBegun] = useState<WrittenFootprint>();
  const { type: stated, value } = draft.footprint ?? {};
  const type = begun ?? stated;
  const { coverage } = intake;
  const written = isWritten(type) ? type : undefined;
  const start = (next: typeof type) =>
    next && { type: next, ...(next === 'cones' ? { value: { radiusArcsec: FIRST_CONE_ARCSEC } } : {}) };
  return (
    <div className="footprint-fields" data-pointer="/footprint">
      <div>
        <ChoiceField
          label="Footprint"
          help="What was observed; outside it silence says nothing."
          unsaid="not stated: from the rows, if they can tell"
          value={type}
          choices={FOOTPRINTS}
          onChange={(next) => {
            setBegun(isWritten(next) ? next : undefined);
            if (!isWritten(next)) change({ footprint: start(next) });
          }}
        />
        {type === 'cones' && (
          <NumberField
            label="Radius of the cones"
            unit="arcsec"
            help="As it was asked of the archive. Neighbours and shifted positions outside the cones cannot be told."
            value={(value as { radiusArcsec?: number } | undefined)?.radiusArcsec}
            min={0}
            onChange={(radiusArcsec) => change({ footprint: { type, value: { radiusArcsec } } })}
          />
        )}
        {written && (
          <FootprintText
            key={written}
            type={written}
            value={written === stated ? value : undefined}
            onChange={(next) => {
              setBegun(undefined);
              change({ footprint: { type: written, value: next } });
            }}
          />
        )}
      </div>
      <div style={{ cursor: isChecking ? 'progress' : undefined }}>
        {coverage?.moc && <CoverageMap moc={coverage.moc} />}
        {coverage && (
          <p className={coverage.moc ? 'small' : 'small facts__open'}>
            {coverage.areaSqDeg !== null && (
              <span className="num">{significant(coverage.areaSqDeg, 3)} square degrees: </span>
            )}
            {coverage.moc ? coverage.note : `No region: ${coverage.note}`}
          </p>
        )}
      </div>
    </div>
  );
}
