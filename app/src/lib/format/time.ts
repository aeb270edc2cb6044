const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const MOMENT = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
});

/** `12 Nov 2026`, in the reader's time zone. */
export const day = (iso: string | null | undefined): string => (iso ? DAY.format(new Date(iso)) : '\u2013');
/** `12 Nov 2026, 14:05`, in the reader's time zone. */
export const moment = (iso: string | null | undefined): string => (iso ? MOMENT.format(new Date(iso)) : '\u2013');

/** A span in words: `8 s`, `2 min 10 s`, `1 h 4 min`. */
export function duration(seconds: number): string {
  if (seconds < 10) return `${seconds < 1 ? seconds.toFixed(1) : Math.round(seconds)} s`;
  const whole = Math.round(seconds);
  if (whole < 60) return `${whole} s`;
  if (whole < 3600) return `${Math.floor(whole / 60)} min${whole % 60 ? ` ${whole % 60} s` : ''}`;
  return `${Math.floor(whole / 3600)} h ${Math.floor((whole % 3600) / 60)} min`;
}

/** A file size: `1.4 MB`. */
export function fileSize(bytes: number): string {
  const units = ['B', 'kB', 'MB', 'GB'];
  const power = Math.min(units.length - 1, bytes > 0 ? Math.floor(Math.log10(bytes) / 3) : 0);
  return `${(bytes / 1000 ** power).toFixed(power ? 1 : 0)} ${units[power]}`;
}
