import { AnchorButton } from '@blueprintjs/core';
import { useState } from 'react';
import { API_BASE } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { searchString } from '#lib/search-string.ts';
import { NumberField } from './field.tsx';

const USUAL_ARCSEC = 120;
const MOST_ARCSEC = 36_000;

/** The detections' positions with a radius, as lists that archives take for a search around many positions. */
export function ArchivePositions({ surveyId, detections }: { surveyId: string; detections: number }) {
  const [radiusArcsec, setRadius] = useState<number | undefined>(USUAL_ARCSEC);
  const isUsable = radiusArcsec !== undefined && radiusArcsec > 0 && radiusArcsec <= MOST_ARCSEC;
  const link = (format: string) =>
    `${API_BASE}/surveys/${surveyId}/positions${searchString({ format, radiusArcsec: String(radiusArcsec) })}`;
  return (
    <section className="panel" aria-label="Ask an archive">
      <div className="panel__head">
        <h2>Ask an archive around the detections</h2>
      </div>
      <div className="panel__body archive-positions">
        <p className="muted">
          Names, positions (ICRS) and the radius of all {count(detections)} detections, to submit to an archive. What it
          returns comes in here with the footprint “cones around the detections” and the same radius, so that sky nobody
          asked for is never taken for empty.
        </p>
        <NumberField label="Radius" unit="arcsec" value={radiusArcsec} min={0} max={MOST_ARCSEC} onChange={setRadius} />
        <div className="row">
          <AnchorButton text="Save as CSV" href={link('csv')} download disabled={!isUsable} />
          <AnchorButton text="Save as VOTable" href={link('votable')} download disabled={!isUsable} />
        </div>
      </div>
    </section>
  );
}
