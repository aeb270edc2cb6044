import { execFileSync, spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import {
  columnDensity,
  COLUMN_DENSITY_PER_SOLAR_MASS_PC2,
  kelvinPerJansky,
} from '@eremite/shared/science/hydrogen/column-density';
import { dynamicalMass } from '@eremite/shared/science/hydrogen/dynamical-mass';
import { fluxInJyHz, hiMass, hiMassFromFrequency } from '@eremite/shared/science/hydrogen/hi-mass';
import { hiMassConstants } from '@eremite/shared/science/hydrogen/hi-mass-constant';
import { RYDBERG_HYDROGEN_MHZ } from '@eremite/shared/science/doubts/line-frequencies';
import { escapeSpeed, KPC_PER_KMS_GYR } from '@eremite/shared/science/doubts/tidal';
import { abFromFlux } from '@eremite/shared/science/photometry/magnitude-system';
import { nuLuminosityOfAb } from '@eremite/shared/science/photometry/star-formation';

const PYTHON = '/usr/bin/python3';
const present = spawnSync(PYTHON, ['-c', 'import astropy.units, astropy.constants']).status === 0;
if (!present) console.warn(`units are not compared with astropy: ${PYTHON} has none`);

/** The same quantities from astropy's units and constants, with no number of ours in them. */
const SCRIPT = `
import json, sys, numpy as np
from astropy import units as u, constants as k
f = 1420.405751768 * u.MHz
mH = 1.00782503223 * k.u
hi = lambda a: 16 * np.pi * mH * (1 * u.Mpc)**2 / (3 * k.h * f * a / u.s)
beam = np.pi / (4 * np.log(2)) * (15 * u.arcsec) * (25 * u.arcsec)
json.dump({
  'perJyHz': (hi(2.86888e-15) * u.Jy * u.Hz).to_value(u.M_sun),
  'perJyKms': (hi(2.86888e-15) * u.Jy * (f * (1 * u.km / u.s) / k.c)).to_value(u.M_sun),
  'kelvin': (1 * u.Jy).to_value(u.K, u.brightness_temperature(f, beam_area=beam)),
  'surface': (1 * u.M_sun / u.pc**2 / mH).to_value(u.cm**-2),
  'dynamical': ((40 * u.km / u.s)**2 * 7 * u.kpc / k.G).to_value(u.M_sun),
  'escape': np.sqrt(2 * k.G * 3e11 * u.M_sun / (120 * u.kpc)).to_value(u.km / u.s),
  'flight': (1 * u.km / u.s * u.Gyr).to_value(u.kpc),
  'rydberg': (k.Ryd * k.c / (1 + k.m_e / k.m_p)).to_value(u.MHz),
  'ab': (0.37 * u.mJy).to_value(u.ABmag),
  'nuLnu': (4 * np.pi * (28 * u.Mpc)**2 * ((20.8 - 0.2385) * u.ABmag).to(u.Jy) * k.c / (0.2301 * u.micron)).to_value(u.erg / u.s),
}, sys.stdout)
`;

describe.skipIf(!present)('quantities against the units and constants of astropy', () => {
  const astropy = present
    ? (JSON.parse(execFileSync(PYTHON, ['-c', SCRIPT], { encoding: 'utf8' })) as Record<string, number>)
    : {};
  const constants = hiMassConstants(2.86888e-15);
  it.each<[string, number, number]>([
    ['perJyHz', constants.perJyHz, 2e-5],
    ['perJyKms', constants.perJyKms, 2e-5],
    ['kelvin', kelvinPerJansky(15, 25), 1e-9],
    ['surface', COLUMN_DENSITY_PER_SOLAR_MASS_PC2, 1e-5],
    ['dynamical', dynamicalMass(40, 7), 5e-5],
    ['escape', escapeSpeed(3e11, 120), 5e-5],
    ['flight', KPC_PER_KMS_GYR, 1e-6],
    ['rydberg', RYDBERG_HYDROGEN_MHZ, 1e-9],
    // Zero point 3631 Jy here, 3630.78 Jy (-48.6) in astropy: 6e-5.
    ['ab', abFromFlux(0.37), 5e-6],
    ['nuLnu', nuLuminosityOfAb(20.8, 0.2385, 0.2301, 28), 7e-5],
  ])('%s', (name, ours, tolerance) => {
    expect(Math.abs(ours / astropy[name]! - 1)).toBeLessThan(tolerance);
  });

  it('the velocity and frequency forms of the HI mass differ by their rounded constants only', () => {
    const ratio = hiMassFromFrequency(fluxInJyHz(1, 0.03), 130) / hiMass(1, 130, 0.03);
    expect(Math.abs(ratio - 1)).toBeLessThan(1e-3);
  });

  it('the column density of a source at redshift zero is 1.823e18 cm^-2 per K km/s', () => {
    expect(columnDensity(0.1, 15, 25) / (0.1 * astropy['kelvin']!)).toBeCloseTo(1.823e18, -12);
  });
});
