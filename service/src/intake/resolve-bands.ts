import type { BandFacts, IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { bandOf } from '@eremite/shared/science/photometry/band-of';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import type { Remarks } from './resolve-columns.ts';
import type { ResolvedBand, ResolvedMagnitude } from './resolved.ts';

/**
 * Settles what is known of each band: of every magnitude column, and of bands the settings describe without a column
 * (a depth may be stated for a list of positions). The usual system of a band is taken where none is given, and said.
 */
export function resolveBands(
  settings: IntakeSettings,
  magnitudes: readonly ResolvedMagnitude[],
  hasReddening: boolean,
  remarks: Remarks,
): ResolvedBand[] {
  const described: { facts: BandFacts; pointer: string }[] = (settings.bands ?? []).map((facts, i) => ({
    facts,
    pointer: `/bands/${i}`,
  }));
  if (typeof settings.band === 'object') described.unshift({ facts: settings.band, pointer: '/band' });
  const canonical = (name: string) => bandOf(name) ?? name.trim();
  const names = [
    ...new Set([...magnitudes.map(({ band }) => band), ...described.map(({ facts }) => canonical(facts.name))]),
  ];
  const unstated: string[] = [];
  const systems: string[] = [];
  const bands = names.map((name): ResolvedBand => {
    const own = described.filter(({ facts }) => canonical(facts.name) === name);
    if (own.length > 1) remarks.faults.push({ pointer: own[1]!.pointer, detail: `Band ${name} is described twice.` });
    const facts = own[0]?.facts;
    const known = BANDS[name as BandId];
    if (!known) {
      remarks.questions.push({
        level: 'warning',
        pointer: own[0]?.pointer ?? '/columns/magnitudes',
        text: `"${name}" is not a band known here: its magnitudes are kept and shown, but no limit follows from them.`,
      });
    }
    if (facts?.system === undefined) systems.push(`${name} ${known?.usualSystem ?? 'AB'}`);
    if (facts?.depth5Sigma == null) unstated.push(name);
    return {
      name,
      system: facts?.system ?? known?.usualSystem ?? 'AB',
      depth5Sigma: facts?.depth5Sigma ?? null,
      seeingFwhmArcsec: facts?.seeingFwhmArcsec ?? null,
      extinction: facts?.extinction ?? 'none',
    };
  });
  const say = (text: string) => remarks.questions.push({ level: 'assumed', pointer: '/bands', text });
  if (systems.length) say(`The magnitude system is not stated: ${systems.join(', ')} assumed.`);
  if (bands.length && described.every(({ facts }) => facts.extinction === undefined)) {
    say('Magnitudes are taken as not corrected for Galactic extinction.');
  }
  const reddened = bands.filter(({ extinction }) => extinction === 'column').map(({ name }) => name);
  if (reddened.length > 0 && !hasReddening) {
    remarks.questions.push({
      level: 'ask',
      pointer: '/columns/reddening',
      text: `The extinction in ${reddened.join(', ')} is to come from the reddening column: which column holds E(B-V)?`,
    });
  }
  if (unstated.length) {
    say(`The depth of ${unstated.join(', ')} is not stated: where this table has no object, that shows nothing.`);
  }
  return bands;
}
