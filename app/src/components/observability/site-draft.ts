/** A site and semester as they are typed. */
export interface SiteDraft {
  name: string;
  latitudeDeg: string;
  longitudeDeg: string;
  semester: string;
  maximumAirmass: string;
}

interface SiteField {
  key: keyof SiteDraft;
  label: string;
  info?: string;
  width: number;
  type?: 'number';
  min?: number;
  max?: number;
  step?: number | 'any';
  placeholder?: string;
  pattern?: string;
}

export const SITE_FIELDS: readonly SiteField[] = [
  { key: 'name', label: 'Site', width: 150, placeholder: 'its name' },
  { key: 'latitudeDeg', label: 'Latitude', info: 'deg', width: 110, type: 'number', min: -90, max: 90, step: 'any' },
  {
    key: 'longitudeDeg',
    label: 'Longitude',
    info: 'deg east',
    width: 130,
    type: 'number',
    min: -180,
    max: 360,
    step: 'any',
  },
  { key: 'semester', label: 'Semester', width: 100, pattern: '(19|20)\\d\\d[AB]', placeholder: '2027A' },
  { key: 'maximumAirmass', label: 'Airmass below', width: 110, type: 'number', min: 1.01, max: 5, step: 'any' },
];

/** The semester a day falls in: A is February to July, B August to January. */
export function thisSemester(now = new Date()): string {
  const month = now.getUTCMonth();
  const year = now.getUTCFullYear();
  if (month === 0) return `${year - 1}B`;
  return `${year}${month <= 6 ? 'A' : 'B'}`;
}

export const siteQuery = (draft: SiteDraft): string => new URLSearchParams({ ...draft }).toString();
