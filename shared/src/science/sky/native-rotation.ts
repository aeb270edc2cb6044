import { DomainError } from '../domain-error.ts';
import { type Direction, wrapTurn } from './direction.ts';
import type { NativePoint } from './sky-projections.ts';

const QUARTER = Math.PI / 2;

/** Where the native pole of a projection lies on the sky, and how the native meridian is turned; radians. */
export interface NativePole extends Direction {
  /** Native longitude of the celestial pole (LONPOLE). */
  readonly lonPole: number;
}

interface Reference extends Direction {
  /** Native latitude of the reference point; its native longitude is 0. */
  readonly theta0: number;
  /** LONPOLE, radians; undefined for the default. */
  readonly lonPole?: number | undefined;
  /** LATPOLE, radians; undefined for the default of 90 degrees. */
  readonly latPole?: number | undefined;
}

/**
 * The native pole from the reference point (CRVAL) of a projection.
 *
 * @throws {DomainError} where LONPOLE and the reference point contradict each other
 *
 * Source: Calabretta & Greisen (2002), A&A 395, 1077, section 2.4, equations 8 to 10.
 */
export function nativePole({ lon, lat, theta0, lonPole, latPole = QUARTER }: Reference): NativePole {
  const phiP = lonPole ?? (lat >= theta0 ? 0 : Math.PI);
  if (theta0 === QUARTER) return { lon, lat, lonPole: phiP };
  const across = Math.cos(theta0) * Math.sin(phiP);
  const ratio = Math.sin(lat) / Math.sqrt(1 - across * across);
  if (Math.abs(ratio) > 1 + 1e-12) {
    throw new DomainError(`nativePole: no pole fits LONPOLE ${phiP} rad with a reference latitude of ${lat} rad`);
  }
  const middle = Math.atan2(Math.sin(theta0), Math.cos(theta0) * Math.cos(phiP));
  const half = Math.acos(Math.max(-1, Math.min(1, ratio)));
  const choices = [middle + half, middle - half]
    .map((angle) => angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI)))
    .filter((angle) => Math.abs(angle) <= QUARTER + 1e-12);
  const [nearest] = choices.sort((a, b) => Math.abs(a - latPole) - Math.abs(b - latPole));
  if (nearest === undefined) throw new DomainError('nativePole: LONPOLE and LATPOLE fit no pole');
  const latP = Math.max(-QUARTER, Math.min(QUARTER, nearest));
  return { lon: poleLongitude(lon, lat, theta0, phiP, latP), lat: latP, lonPole: phiP };
}

function poleLongitude(lon: number, lat: number, theta0: number, phiP: number, latP: number): number {
  const close = 1e-12;
  if (QUARTER - Math.abs(lat) < close) return lon;
  if (QUARTER - latP < close) return lon + phiP - Math.PI;
  if (QUARTER + latP < close) return lon - phiP;
  const sine = (Math.sin(phiP) * Math.cos(theta0)) / Math.cos(lat);
  const cosine = (Math.sin(theta0) - Math.sin(latP) * Math.sin(lat)) / (Math.cos(latP) * Math.cos(lat));
  return lon - Math.atan2(sine, cosine);
}

/** Turns about the pole, either way: the formulas for both directions are the same with the longitudes exchanged. */
function turn(from: number, lat: number, fromPole: number, latPole: number) {
  const away = from - fromPole;
  const cosLat = Math.cos(lat);
  const y = -cosLat * Math.sin(away);
  const x = Math.sin(lat) * Math.cos(latPole) - cosLat * Math.sin(latPole) * Math.cos(away);
  const z = Math.sin(lat) * Math.sin(latPole) + cosLat * Math.cos(latPole) * Math.cos(away);
  return { turned: Math.atan2(y, x), latitude: Math.atan2(z, Math.hypot(x, y)) };
}

/** A native direction on the sky (equation 2), radians. */
export function nativeToSky(pole: NativePole, { phi, theta }: NativePoint): Direction {
  const { turned, latitude } = turn(phi, theta, pole.lonPole, pole.lat);
  return { lon: wrapTurn(pole.lon + turned), lat: latitude };
}

/** A direction of the sky in native coordinates (equation 5), radians; φ in (-π, π]. */
export function skyToNative(pole: NativePole, lon: number, lat: number): NativePoint {
  const { turned, latitude } = turn(lon, lat, pole.lon, pole.lat);
  const phi = wrapTurn(pole.lonPole + turned + Math.PI) - Math.PI;
  return { phi: phi === -Math.PI ? Math.PI : phi, theta: latitude };
}
