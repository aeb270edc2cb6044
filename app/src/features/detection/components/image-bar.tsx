import { Button, ButtonGroup, HTMLSelect } from '@blueprintjs/core';
import { ARCSEC_PER_RAD } from '@eremite/shared/drawing/panel-plane';
import { DEGREE } from '@eremite/shared/science/constants';
import { fromTangentPlane } from '@eremite/shared/science/sky/tangent-plane';
import { COLOUR_MAPS } from '#components/sky-image/colour-maps.ts';
import { setImageSettings, useImageSettings } from '#components/sky-image/image-settings.ts';
import { valueAt } from '#components/sky-image/paint-raster.ts';
import { STRETCHES } from '#components/sky-image/stretch.ts';
import { fixed, significant } from '#lib/format/number.ts';
import { declination, rightAscension } from '#lib/format/position.ts';
import { type useBackdrop, useLook } from '../hooks/use-backdrop.ts';
import './images.css';

interface ImageBarProps extends ReturnType<typeof useBackdrop> {
  centre: { raDeg: number; decDeg: number };
}

const CUTS = [90, 95, 99, 99.5, 99.9, 100];

/** Which image stands behind the panel, how it is painted, and what it reads under the pointer. */
export function ImageBar({ images, chosen, backdrop, point, centre }: ImageBarProps) {
  const settings = useImageSettings();
  const look = useLook();
  if (images.length === 0) return null;
  return (
    <div className="image-bar">
      <ButtonGroup className="image-bar__bands">
        <Button
          size="small"
          text="no image"
          active={!chosen}
          aria-pressed={!chosen}
          onClick={() => setImageSettings({ shown: null, blinks: false })}
        />
        {images.map(({ id, label }) => (
          <Button
            key={id}
            size="small"
            text={label}
            active={chosen?.id === id}
            aria-pressed={chosen?.id === id}
            onClick={() => setImageSettings({ shown: label, blinks: false })}
          />
        ))}
      </ButtonGroup>
      <Button
        size="small"
        text="blink"
        active={settings.blinks}
        aria-pressed={settings.blinks}
        disabled={images.length < 2 || !chosen}
        title="Shows the images in turn until pressed again"
        onClick={() => setImageSettings({ blinks: !settings.blinks })}
      />
      <HTMLSelect
        aria-label="Stretch"
        options={[...STRETCHES]}
        value={settings.stretch}
        disabled={!chosen}
        onChange={({ currentTarget }) => setImageSettings({ stretch: currentTarget.value as typeof settings.stretch })}
      />
      <HTMLSelect
        aria-label="Share of the pixels between the cuts"
        options={CUTS.map((value) => ({ value, label: `${value} %` }))}
        value={settings.percent}
        disabled={!chosen || settings.stretch === 'percentile'}
        onChange={({ currentTarget }) => setImageSettings({ percent: Number(currentTarget.value) })}
      />
      <HTMLSelect
        aria-label="Colours"
        options={COLOUR_MAPS}
        value={settings.colours}
        disabled={!chosen}
        onChange={({ currentTarget }) => setImageSettings({ colours: currentTarget.value as typeof settings.colours })}
      />
      <Button
        size="small"
        text="inverse"
        active={look.isInverse}
        aria-pressed={look.isInverse}
        disabled={!chosen}
        onClick={() => setImageSettings({ isInverse: !look.isInverse })}
      />
      <output className="image-bar__reading num">
        {chosen && backdrop && point ? reading({ chosen, raster: backdrop.raster, point, centre }) : ''}
      </output>
    </div>
  );
}

interface Reading {
  chosen: NonNullable<ImageBarProps['chosen']>;
  raster: NonNullable<ImageBarProps['backdrop']>['raster'];
  point: readonly [number, number];
  centre: ImageBarProps['centre'];
}

/** Place and value under the pointer; surface brightness where the header gives a zero point. */
function reading({ chosen: { image }, raster, point: [x, y], centre }: Reading): string {
  const [xi, eta] = [-x / ARCSEC_PER_RAD, y / ARCSEC_PER_RAD];
  const { lon, lat } = fromTangentPlane(xi, eta, centre.raDeg * DEGREE, centre.decDeg * DEGREE);
  const place = `${rightAscension(lon / DEGREE)} ${declination(lat / DEGREE)}`;
  const value = valueAt(raster, x, y);
  if (Number.isNaN(value)) return `${place}  no value`;
  const covered = Math.round((2 * raster.halfArcsec) / raster.pixels / image.pixelArcsec);
  const mean = covered > 1 ? ` (mean of ${covered} × ${covered})` : '';
  const brightness =
    image.zeroPointMag !== null && value > 0
      ? `, ${fixed(image.zeroPointMag - 2.5 * Math.log10(value / image.pixelArcsec ** 2), 1)} mag/arcsec²`
      : '';
  return `${place}  ${significant(value, 4)} ${image.unit ?? ''}${mean}${brightness}`;
}
