import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { setImageSettings } from '#components/sky-image/image-settings.ts';
import { rasterCanvas } from '#components/sky-image/paint-raster.ts';
import { fixed } from '#lib/format/number.ts';
import { rasterQuery } from '../api/observations.ts';
import { type ImageObservation, useLook } from '../hooks/use-backdrop.ts';

const SIDE = 168;

interface BandStripProps {
  images: readonly ImageObservation[];
  /** Half the side of every picture, arcsec: the same for all. */
  halfArcsec: number;
  /** Radius of the search circle, arcsec. */
  radiusArcsec: number;
}

/** All images side by side at the same scale; choosing one puts it behind the panel. */
export const BandStrip = ({ images, halfArcsec, radiusArcsec }: BandStripProps) => (
  <div className="band-strip">
    {images.map((image) => (
      <BandPicture key={image.id} image={image} halfArcsec={halfArcsec} radiusArcsec={radiusArcsec} />
    ))}
    <p className="small muted band-strip__scale">
      each {fixed(2 * halfArcsec, 0)}″ across, north up, east left; the circle is the search radius of{' '}
      {fixed(radiusArcsec, 0)}″
    </p>
  </div>
);

interface BandPictureProps extends Omit<BandStripProps, 'images'> {
  image: ImageObservation;
}

function BandPicture({ image, halfArcsec, radiusArcsec }: BandPictureProps) {
  const holder = useRef<HTMLSpanElement>(null);
  const look = useLook();
  const { data } = useQuery(
    rasterQuery(image.id, halfArcsec, Math.min(2 * SIDE, (2 * halfArcsec) / image.image.pixelArcsec)),
  );
  useEffect(() => {
    const canvas = data && rasterCanvas(data, look);
    if (canvas) holder.current?.replaceChildren(canvas);
  }, [data, look]);
  const radius = (radiusArcsec / halfArcsec) * (SIDE / 2);
  return (
    <button
      type="button"
      className="band-strip__band"
      onClick={() => setImageSettings({ shown: image.label, blinks: false })}
      aria-label={`Show ${image.label} behind the sky panel`}
    >
      <span className="band-strip__picture" style={{ width: SIDE, height: SIDE }}>
        <span ref={holder} />
        <svg width={SIDE} height={SIDE} aria-hidden="true">
          <circle cx={SIDE / 2} cy={SIDE / 2} r={radius} />
        </svg>
      </span>
      <span className="mono small">{image.label}</span>
    </button>
  );
}
