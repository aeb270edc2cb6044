const UNITS =
  'deg degree degrees arcmin arcsec arcsecond arcseconds mas uas rad sr hourangle h hr min s sec second d day days yr year myr gyr jd mjd ' +
  'hz khz mhz ghz m cm mm um nm km pc kpc mpc au angstrom angstroms a m/s km/s kms kms-1 km.s-1 mag mags dex jy mjy ujy nmgy nanomaggy ' +
  'nanomaggies msun lsun rsun solmass sollum k kelvin ev kev erg w ct cts count counts adu electron pix pixel pixels % percent mag/arcsec2 ' +
  'msol lsol g kg n v "h:m:s" "d:m:s" h:m:s d:m:s hms dms mas/yr';
const KNOWN = new Set(UNITS.split(' '));
const PARTS = /[\s.*/()[\]{}^~-]+|\*\*|\d+/;

/** Whether a word reads as a physical unit, such as km/s, Jy.km.s-1 or [mag]. */
export function isUnitWord(word: string): boolean {
  const bare = word
    .trim()
    .replace(/^[[({]\s*(.*?)\s*[\])}]$/, '$1')
    .toLowerCase();
  if (bare === '' || bare.length > 40) return false;
  if (KNOWN.has(bare) || /^["']$/.test(bare)) return true;
  const parts = bare
    .replace(/^log\s*\(?/, '')
    .split(PARTS)
    .filter((part) => part !== '');
  return parts.length > 0 && parts.every((part) => KNOWN.has(part.replace(/[µμ]/g, 'u').replace(/(sun|sol)$/, 'sun')));
}

/** The unit at the end of a column name such as "RA (deg)" or "v [km/s]". */
export function unitInName(name: string): string | undefined {
  const unit = /[[(]([^()[\]]+)[\])]\s*$/.exec(name)?.[1];
  return unit !== undefined && unit.trim().length > 1 && isUnitWord(unit) ? unit.trim() : undefined;
}
