import type { ImageFacts } from '@eremite/shared/contracts/observation';
import { DEGREE } from '@eremite/shared/science/constants';
import { separation } from '@eremite/shared/science/sky/separation';

interface Place {
  name: string;
  raDeg: number;
  decDeg: number;
}

const plain = (text: string) => text.toLowerCase().replace(/[^a-z0-9+-]/g, '');

/**
 * The detection a file is named after: the one whose name the file's name, or the object its header names, holds; of
 * several the longest name, so that S10 is not taken for S1.
 */
export function byName<D extends Place>(detections: readonly D[], ...words: (string | null)[]): D | undefined {
  const texts = words.flatMap((word) => (word === null ? [] : [plain(word)]));
  const named = detections.filter(({ name }) => {
    const wanted = plain(name);
    return wanted !== '' && texts.some((text) => holds(text, wanted));
  });
  return named.sort((a, b) => plain(b.name).length - plain(a.name).length)[0];
}

/** Whether a text holds a name that does not go on as a number. */
function holds(text: string, name: string): boolean {
  for (let at = text.indexOf(name); at >= 0; at = text.indexOf(name, at + 1)) {
    const goesOn = /\d/.test(name.at(-1)!) && /\d/.test(text[at + name.length] ?? '');
    const began = /\d/.test(name[0]!) && /\d/.test(text[at - 1] ?? '');
    if (!goesOn && !began) return true;
  }
  return false;
}

/** Degrees between the middle of an image and a place. */
export function degreesOff(facts: Pick<ImageFacts, 'raDeg' | 'decDeg'>, place: Omit<Place, 'name'>): number {
  const radians = [facts.raDeg, facts.decDeg, place.raDeg, place.decDeg].map((deg) => deg * DEGREE);
  return separation(...(radians as [number, number, number, number])) / DEGREE;
}

/** An angle as a person says it. */
export function angleWords(deg: number): string {
  if (deg >= 1) return `${deg.toFixed(1)}°`;
  return deg >= 1 / 60 ? `${(deg * 60).toFixed(1)}′` : `${(deg * 3600).toFixed(0)}″`;
}
