import type { Site } from '@eremite/shared/contracts/observability';
import { Body, type FlexibleDateTime, Observer, SearchAltitude, SiderealTime } from 'astronomy-engine';

const HOUR_MS = 3600_000;
const DAY_MS = 24 * HOUR_MS;
/** Steps in which the dark is gone through; hours are good to half of one at each end. */
export const STEP_MINUTES = 5;

/** The dark part of one night, from the end of evening twilight to the beginning of morning twilight. */
export interface DarkNight {
  /** Date of its evening, local mean time. */
  date: string;
  start: Date;
  end: Date;
  /** Cosine and sine of the local sidereal time at the middle of each step. */
  cosSidereal: Float64Array;
  sinSidereal: Float64Array;
}

/** First and last evening of a semester: A is February to July, B August to January. */
export function semesterDates(semester: string): { from: string; to: string } {
  const year = Number(semester.slice(0, 4));
  return semester.endsWith('A')
    ? { from: `${year}-02-01`, to: `${year}-07-31` }
    : { from: `${year}-08-01`, to: `${year + 1}-01-31` };
}

/**
 * The nights of a semester at a site; those without dark are left out.
 *
 * @param twilightDeg depth of the Sun below the horizon at which it is dark: 18 is astronomical twilight
 */
export function darkNights(site: Site, semester: string, twilightDeg: number): DarkNight[] {
  const { from, to } = semesterDates(semester);
  const observer = new Observer(site.latitudeDeg, site.longitudeDeg, site.heightM);
  const longitudeHours = (((site.longitudeDeg + 180) % 360) - 180) / 15;
  const nights: DarkNight[] = [];
  for (let day = Date.parse(from); day <= Date.parse(to); day += DAY_MS) {
    const noon = new Date(day + (12 - longitudeHours) * HOUR_MS);
    const dark = darkOf(observer, noon, twilightDeg);
    if (!dark) continue;
    const steps = Math.floor((dark.end.getTime() - dark.start.getTime()) / (STEP_MINUTES * 60_000));
    if (steps < 1) continue;
    const siderealRad = Float64Array.from({ length: steps }, (_, i) => {
      const at = new Date(dark.start.getTime() + (i + 0.5) * STEP_MINUTES * 60_000);
      return localSidereal(at, site.longitudeDeg);
    });
    nights.push({
      date: new Date(day).toISOString().slice(0, 10),
      ...dark,
      cosSidereal: siderealRad.map(Math.cos),
      sinSidereal: siderealRad.map(Math.sin),
    });
  }
  return nights;
}

function localSidereal(at: FlexibleDateTime, longitudeDeg: number): number {
  return (SiderealTime(at) * 15 + longitudeDeg) * (Math.PI / 180);
}

/** Between noon and noon the Sun goes down through the limit once at most, and comes up through it once. */
function darkOf(observer: Observer, noon: Date, twilightDeg: number): { start: Date; end: Date } | undefined {
  const start = SearchAltitude(Body.Sun, observer, -1, noon, 1, -twilightDeg);
  // Neither crossed: either the Sun never sinks so deep, or it is dark the whole day long; the latter only in polar winter.
  if (!start) return undefined;
  const end = SearchAltitude(Body.Sun, observer, +1, start, 1, -twilightDeg);
  return end ? { start: start.date, end: end.date } : undefined;
}
