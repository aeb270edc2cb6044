const pad = (value: number, width: number) => String(value).padStart(width, '0');

/** Splits a non-negative number of smallest units (already rounded) into three sexagesimal fields. */
function fields(units: number, perMinute: number): [number, number, number] {
  const seconds = units % perMinute;
  const minutes = Math.floor(units / perMinute) % 60;
  return [Math.floor(units / perMinute / 60), minutes, seconds];
}

/**
 * Right ascension as hours, minutes, seconds: `03ʰ12ᵐ04.1ˢ`.
 * @param deg degrees, any finite value (wrapped)
 * @param decimals decimals of the seconds of time
 */
export function rightAscension(deg: number, decimals = 1): string {
  const scale = 10 ** decimals;
  const turn = 86_400 * scale;
  const units = Math.round((((deg % 360) + 360) % 360) * 240 * scale) % turn;
  const [h, m, s] = fields(units, 60 * scale);
  const seconds = (s / scale).toFixed(decimals).padStart(decimals ? 3 + decimals : 2, '0');
  return `${pad(h, 2)}ʰ${pad(m, 2)}ᵐ${seconds}ˢ`;
}

/**
 * Declination as degrees, minutes, seconds with a sign: `+14°07′22″`.
 * @param deg degrees, in [-90, 90]
 * @param decimals decimals of the seconds of arc
 */
export function declination(deg: number, decimals = 0): string {
  const scale = 10 ** decimals;
  const units = Math.round(Math.abs(deg) * 3600 * scale);
  const [d, m, s] = fields(units, 60 * scale);
  const seconds = (s / scale).toFixed(decimals).padStart(decimals ? 3 + decimals : 2, '0');
  return `${deg < 0 ? '−' : '+'}${pad(d, 2)}°${pad(m, 2)}′${seconds}″`;
}
