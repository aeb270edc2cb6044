import type { EditionTable } from '@eremite/shared/contracts/edition';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { escapeTex, type LatexTable } from '../tables/writers/latex.ts';

/** Columns that fit a page, with their heads; the machine-readable table has them all. */
const HEADS: Record<EditionTable, Record<string, string>> = {
  shortlist: {
    detection: 'Source',
    ra_deg: '$\\alpha$',
    dec_deg: '$\\delta$',
    cz_kms: '$cz$',
    distance_mpc: '$D$',
    log_mhi: '$\\log M_\\mathrm{HI}$',
    settled_starlight: 'Starlight',
    p_none: '$P_\\mathrm{none}$',
    power: 'Power',
    gas_to_light: '$M_\\mathrm{HI}/L$',
    settled_surroundings: 'Surroundings',
    p_alone: '$P_\\mathrm{alone}$',
  },
  limits: {
    detection: 'Source',
    band: 'Band',
    depth_point: '$m_{5\\sigma}$',
    depth_extended: '$m_\\mathrm{lim}$',
    depth_radius: '$r_e$',
    expected_mag: '$m_\\mathrm{exp}$',
    completeness: '$C$',
    abs_mag: '$M$',
    luminosity: '$L$',
    gas_to_light: '$M_\\mathrm{HI}/L$',
    sfr: 'SFR',
  },
  candidates: {
    detection: 'Source',
    row: 'Object',
    separation_arcsec: '$\\theta$',
    separation_kpc: '$d$',
    dv_kms: '$\\Delta v$',
    band: 'Band',
    magnitude: '$m$',
    p_chance: '$P_\\mathrm{chance}$',
    probability: '$P$',
  },
  neighbours: {
    detection: 'Source',
    row: 'Neighbour',
    separation_kpc: '$d$',
    dv_kms: '$\\Delta v$',
    absolute_magnitude: '$M$',
    log_mhi: '$\\log M_\\mathrm{HI}$',
  },
  doubts: { detection: 'Source', doubt: 'Doubt', grade: 'Grade', value: 'Value', unit: 'Unit' },
  grounds: { detection: 'Source', about: 'About', weight: 'Weight', ground: 'Ground' },
  overrides: { detection: 'Source', row: 'Object', action: 'Word', by: 'By', note: 'Note' },
  reviews: {
    detection: 'Source',
    said_as: 'As',
    starlight: 'Starlight',
    surroundings: 'Surroundings',
    by: 'By',
    note: 'Note',
  },
};

const NOTES: Partial<Record<EditionTable, string>> = {
  shortlist:
    'Verdicts are those settled by the team. $P_\\mathrm{none}$ is the probability of no stars above the limit among the exclusive hypotheses of \\citet{sutherland1992} and \\citet{budavari2008}; Power the chance that an ordinary galaxy with this much gas would have been seen; $P_\\mathrm{alone}$ the probability of no neighbour. HI masses follow \\citet{meyer2017}.',
  candidates: 'Chance probabilities follow \\citet{downes1986}, exclusive probabilities \\citet{sutherland1992}.',
  limits: 'Limits for extended sources of effective radius $r_e$ follow \\citet{graham2005}.',
};

/** How a table of an edition stands in an article. */
export function latexLayout(table: EditionTable, number: number, description: string): LatexTable {
  return {
    caption: description,
    label: `tab:edition${number}-${table}`,
    comments: [NOTES[table], escapeTex(SCREENING_CAUTION)].filter(Boolean).join(' '),
    heads: HEADS[table],
  };
}
