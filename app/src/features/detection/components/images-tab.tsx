import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { useQuery } from '@tanstack/react-query';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { fixed, significant } from '#lib/format/number.ts';
import { observationsQuery } from '../api/observations.ts';
import { finestFirst, type ImageObservation } from '../hooks/use-backdrop.ts';
import { AddObservations } from './add-observations.tsx';
import { BandStrip } from './band-strip.tsx';
import { ObservationFacts } from './observation-facts.tsx';

const FRAME_WORDS = { icrs: 'ICRS', fk5: 'FK5 J2000', b1950: 'FK4 B1950', galactic: 'galactic coordinates' } as const;

interface ImagesTabProps {
  detail: VerdictDetail;
  mayAdd: boolean;
}

/** The images of a detection, side by side and one by one. */
export function ImagesTab({ detail, mayAdd }: ImagesTabProps) {
  const id = detail.verdict.detectionId;
  const { data, error, isPending } = useQuery(observationsQuery(id));
  const images = finestFirst(data?.items ?? []);
  const radius = detail.searchRadiusArcsec;
  return (
    <section className="stack">
      <ProblemCallout error={error} />
      {isPending && <Loading what="Reading the images" />}
      {data && images.length === 0 && (
        <p className="muted">
          No image of this detection was uploaded. A FITS image with celestial coordinates stands behind the sky panel,
          in its place and scale.
        </p>
      )}
      {images.length > 0 && <BandStrip images={images} halfArcsec={1.5 * radius} radiusArcsec={radius} />}
      {images.map((image) => (
        <ImageFactsList key={image.id} item={image} />
      ))}
      {mayAdd && <AddObservations detectionId={id} what="images" accept=".fits,.fit,.fts,.gz" />}
    </section>
  );
}

function ImageFactsList({ item }: { item: ImageObservation }) {
  const { width, height, pixelArcsec, projection, frame, unit, beam, zeroPointMag, notes } = item.image;
  return (
    <article className="observation">
      <h4 className="mono">{item.label}</h4>
      <p className="small num">
        {width} × {height} pixels of {significant(pixelArcsec, 3)}″, {projection} in {FRAME_WORDS[frame]}
        {unit ? `, ${unit}` : ', unit not stated'}
        {zeroPointMag !== null && `, zero point ${fixed(zeroPointMag, 2)} mag`}
        {beam && `, beam ${fixed(beam.majorArcsec, 1)}″ × ${fixed(beam.minorArcsec, 1)}″`}
      </p>
      {notes.map((note) => (
        <p key={note} className="small muted">
          {note}
        </p>
      ))}
      <ObservationFacts item={item} />
    </article>
  );
}
