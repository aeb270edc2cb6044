import { DEEP_TABLE, HI_TABLE, SETTINGS } from './small-survey.ts';

/** Without draws and shifted positions, which take many times as long as the verdicts themselves. */
export const QUICK_SETTINGS = { ...SETTINGS, robustness: { draws: 0 }, control: { offsetsPerSource: 0 } };

/**
 * An HI list and a catalogue large enough that a run takes seconds: detections on a grid of a tenth of a degree, each third
 * one with a galaxy.
 */
export function crowdedTables(detections = 6000) {
  const hi = ['name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr,reliability'];
  const deep = ['id,ra,dec,rmag'];
  for (let i = 0; i < detections; i++) {
    const raDeg = 150 + (i % 100) / 10;
    const decDeg = -5 + Math.floor(i / 100) / 10;
    hi.push(`C${i},${raDeg},${decDeg},${3000 + ((i * 37) % 9000)},80,1.2,10,0.99`);
    for (let k = 0; k < 3; k++) {
      const north = k === 0 && i % 3 === 0 ? 2 / 3600 : 0.01 + k * 0.02;
      deep.push(`d${i}-${k},${raDeg},${(decDeg + north).toFixed(7)},${17 + ((i + k) % 60) / 10}`);
    }
  }
  return {
    hi: { ...HI_TABLE, text: hi.join('\n'), settings: { ...HI_TABLE.settings, name: 'crowded HI list' } },
    deep: { ...DEEP_TABLE, text: deep.join('\n'), settings: { ...DEEP_TABLE.settings, name: 'crowded deep' } },
  };
}
