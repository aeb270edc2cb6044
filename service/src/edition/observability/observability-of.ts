import type { ObservabilityAnswer, ObservabilityQuery } from '@eremite/shared/contracts/observability';
import { Body, EquatorFromVector, GeoVector, MakeTime, Rotation_EQJ_EQD, RotateVector, Vector } from 'astronomy-engine';
import { DEGREE } from '@eremite/shared/science/constants';
import { separation } from '@eremite/shared/science/sky/separation';
import { type DarkNight, darkNights, semesterDates, STEP_MINUTES } from './dark-nights.ts';

export interface Target {
  detectionId: string;
  name: string;
  raDeg: number;
  decDeg: number;
}

/**
 * Airmass at an altitude.
 *
 * @param altitudeDeg above the horizon
 * @returns Kasten & Young (1989), Applied Optics 28, 4735
 */
export function airmassAt(altitudeDeg: number): number {
  return 1 / (Math.sin(altitudeDeg * DEGREE) + 0.50572 * (altitudeDeg + 6.07995) ** -1.6364);
}

/** Altitude in degrees at which {@link airmassAt} is as given; it falls with altitude, so bisection finds it. */
function altitudeOf(airmass: number): number {
  let [low, high] = [0, 90];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (airmassAt(middle) > airmass) low = middle;
    else high = middle;
  }
  return high;
}

/**
 * Dark hours below an airmass and the best nights of some positions, from one site in one semester. Twilight, sidereal
 * time, precession and nutation by astronomy-engine; refraction is left out, which at airmass 2 is 1.7 arcmin.
 */
export function observabilityOf(targets: readonly Target[], query: ObservabilityQuery): ObservabilityAnswer {
  const { semester, maximumAirmass, twilightDeg, ...site } = query;
  const nights = darkNights(site, semester, twilightDeg);
  const { from, to } = semesterDates(semester);
  const toDate = Rotation_EQJ_EQD(MakeTime(new Date((Date.parse(from) + Date.parse(to)) / 2)));
  const [sinLatitude, cosLatitude] = [Math.sin(site.latitudeDeg * DEGREE), Math.cos(site.latitudeDeg * DEGREE)];
  const sinLeast = Math.sin(altitudeOf(maximumAirmass) * DEGREE);
  const items = targets.map(({ detectionId, name, raDeg, decDeg }) => {
    const target = { detectionId, name, raDeg, decDeg };
    const { ra, dec } = ofDate(target, toDate);
    const sines = sinLatitude * Math.sin(dec);
    // cos(sidereal - ra) by its addition theorem: thousands of targets are gone through in a request.
    const [cosRa, sinRa] = [cosLatitude * Math.cos(dec) * Math.cos(ra), cosLatitude * Math.cos(dec) * Math.sin(ra)];
    let hours = 0;
    let best: { night: DarkNight; hours: number } | undefined;
    let transit: { night: DarkNight; near: number } | undefined;
    for (const night of nights) {
      const { cosSidereal, sinSidereal } = night;
      let steps = 0;
      for (let i = 0; i < cosSidereal.length; i++) {
        if (sines + cosRa * cosSidereal[i]! + sinRa * sinSidereal[i]! >= sinLeast) steps++;
      }
      const ofNight = (steps * STEP_MINUTES) / 60;
      hours += ofNight;
      if (!best || ofNight > best.hours) best = { night, hours: ofNight };
      const middle = Math.floor(cosSidereal.length / 2);
      const near = Math.cos(ra) * cosSidereal[middle]! + Math.sin(ra) * sinSidereal[middle]!;
      if (!transit || near > transit.near) transit = { night, near };
    }
    const highest = 90 - Math.abs(site.latitudeDeg - dec / DEGREE);
    return {
      ...target,
      hours: Math.round(hours * 10) / 10,
      bestNightHours: Math.round((best?.hours ?? 0) * 100) / 100,
      bestNight: best && best.hours > 0 ? best.night.date : null,
      transitDate: highest > 0 ? (transit?.night.date ?? null) : null,
      leastAirmass: highest > 0 ? Math.round(airmassAt(highest) * 1000) / 1000 : null,
      moonSeparationDeg: transit && highest > 0 ? moonSeparation(target, transit.night) : null,
    };
  });
  return { site, semester, from, to, maximumAirmass, twilightDeg, items };
}

/** Right ascension and declination of the true equator of date, radians. */
function ofDate({ raDeg, decDeg }: Target, toDate: ReturnType<typeof Rotation_EQJ_EQD>): { ra: number; dec: number } {
  const [ra, dec] = [raDeg * DEGREE, decDeg * DEGREE];
  const vector = new Vector(Math.cos(dec) * Math.cos(ra), Math.cos(dec) * Math.sin(ra), Math.sin(dec), MakeTime(0));
  const turned = EquatorFromVector(RotateVector(toDate, vector));
  return { ra: turned.ra * 15 * DEGREE, dec: turned.dec * DEGREE };
}

function moonSeparation({ raDeg, decDeg }: Target, { start, end }: DarkNight): number {
  const moon = EquatorFromVector(GeoVector(Body.Moon, new Date((start.getTime() + end.getTime()) / 2), true));
  const apart = separation(raDeg * DEGREE, decDeg * DEGREE, moon.ra * 15 * DEGREE, moon.dec * DEGREE);
  return Math.round((apart / DEGREE) * 10) / 10;
}
