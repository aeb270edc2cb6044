"""Writes images of every kind the product reads into a folder, and says what astropy makes of them, as JSON."""
import glob
import gzip
import json
import os
import shutil
import sys
import warnings

import astropy
import numpy as np
from astropy.io import fits
from astropy.wcs import WCS

warnings.simplefilter('ignore')
folder = sys.argv[1]
rng = np.random.default_rng(21)
cases = []


def say(name, header, data=None):
    """Pixels and directions of an image both ways; its values where they are given."""
    w = WCS(header).celestial
    nx, ny = header['NAXIS1'], header['NAXIS2']
    pixels = np.column_stack([rng.uniform(0.5, nx + 0.5, 40), rng.uniform(0.5, ny + 0.5, 40)])
    sky = w.all_pix2world(pixels, 1)
    good = np.isfinite(sky).all(axis=1)
    cases.append({
        'name': name,
        'pixels': pixels[good].tolist(),
        'sky': sky[good].tolist(),
        'values': None if data is None else [None if not np.isfinite(v) else float(v) for v in np.ravel(data)],
    })


def write(name, header_cards, data=None, packed=False):
    hdu = fits.PrimaryHDU(np.zeros((37, 53), dtype='>f4') if data is None else data)
    hdu.header.update(header_cards)
    path = f'{folder}/{name}.fits'
    hdu.writeto(path, overwrite=True)
    if packed:
        with open(path, 'rb') as plain, gzip.open(path + '.gz', 'wb') as out:
            out.write(plain.read())
    with fits.open(path) as opened:
        values = None if data is None else np.squeeze(np.array(opened[0].data, dtype=float))
        say(name + ('.fits.gz' if packed else '.fits'), opened[0].header, values)


def cards(code, lon=150.2, lat=22.0, step=2e-3, prefix=('RA---', 'DEC--'), **more):
    return {
        'CTYPE1': prefix[0] + code, 'CTYPE2': prefix[1] + code, 'CRVAL1': lon, 'CRVAL2': lat,
        'CRPIX1': 20.3, 'CRPIX2': 11.9, 'CDELT1': -step, 'CDELT2': step, 'CUNIT1': 'deg', 'CUNIT2': 'deg', **more,
    }


SAMPLES = ['wcs/tests/data/dss.14.29.56-62.41.05.fits.gz', 'nddata/tests/data/sip-wcs.fits']
SAMPLES += [f'io/fits/tests/data/{name}.fits' for name in ['scale', 'checksum', 'test0']]
# What is refused, and for what reason.
REFUSED = {'io/fits/tests/data/comp.fits': 'tile-compressed', 'modeling/tests/data/1904-66_AZP.fits': 'projection AZP',
           'wcs/tests/data/dist_lookup.fits.gz': 'lookup'}
CODES = ['TAN', 'SIN', 'ARC', 'STG', 'ZEA', 'CAR', 'CEA', 'MER', 'SFL', 'AIT']
CYLINDERS = ['CAR', 'CEA', 'MER', 'SFL', 'AIT']
for code in CODES:
    for k, (lon, lat, step) in enumerate([(150.2, 22.0, 2e-3), (0.01, -63.5, 5e-4), (10, 89.7, 5e-3), (200, 0.0, 0.1)]):
        write(f'{code}-{k}', cards(code, lon, lat, step, RADESYS='ICRS'))
    write(f'{code}-turned', cards(code, 77, -5, 3e-4, PC1_1=0.8, PC1_2=-0.6, PC2_1=0.6, PC2_2=0.8))
    write(f'{code}-lonpole', cards(code, 77, 30, 3e-4, LONPOLE=30.0 if code in ('CAR', 'CEA', 'MER', 'SFL', 'AIT') else 150.0))
for code in CYLINDERS:
    write(f'{code}-equator', cards(code, 340, 0, 0.5, LONPOLE=0.0))
    write(f'{code}-latpole', cards(code, 30, 10, 0.01, LONPOLE=60.0, LATPOLE=-90.0))
write('SIN-slant', cards('SIN', 77, 30, 3e-2, PV2_1=0.12, PV2_2=-0.3))
write('NCP', cards('NCP', 77, 64, 3e-2, EQUINOX=1950.0))
write('CEA-lambda', cards('CEA', 77, 0, 3e-2, PV2_1=0.5))
write('crota', cards('TAN', 77, 30, 3e-3, CROTA2=25.0))
write('galactic', cards('ZEA', 118.0, -40, 3e-3, prefix=('GLON-', 'GLAT-')))
write('swapped', {**cards('TAN', 22.0, 150.2, 3e-3, prefix=('DEC--', 'RA---')), 'CDELT1': 3e-3, 'CDELT2': -3e-3})
cd = cards('TAN', 5, 5)
del cd['CDELT1'], cd['CDELT2']
write('cd', {**cd, 'CD1_1': -1e-3, 'CD1_2': 2e-4, 'CD2_1': 3e-4, 'CD2_2': 9e-4})
write('sip', {**cd, 'CTYPE1': 'RA---TAN-SIP', 'CTYPE2': 'DEC--TAN-SIP', 'CD1_1': -1e-3, 'CD1_2': 0.0, 'CD2_1': 0.0,
              'CD2_2': 1e-3, 'A_ORDER': 2, 'A_2_0': 2e-4, 'A_1_1': -1e-4, 'B_ORDER': 3, 'B_0_2': 1e-4, 'B_2_1': 2e-6})

where = cards('TAN')
ints = rng.integers(-120, 120, (4, 6))
for kind in ['u1', 'i2', 'i4', 'i8', 'f4', 'f8', 'u2', 'u4', 'i1']:
    data = np.abs(ints).astype(kind) if kind[0] == 'u' else ints.astype(kind)
    if kind[0] == 'f':
        data = data + data.dtype.type(0.25)
        data[1, 2] = np.nan
    write(f'type-{kind}', where, data, packed=kind in ('f4', 'i2'))
scaled = fits.PrimaryHDU(ints.astype('i2'))
scaled.header.update({**where, 'BSCALE': 0.125, 'BZERO': 12.5, 'BLANK': int(ints[2, 3])})
scaled.writeto(f'{folder}/scaled.fits', output_verify='ignore')
with fits.open(f'{folder}/scaled.fits') as opened:
    say('scaled.fits', opened[0].header, np.array(opened[0].data, dtype=float))
write('axes-of-one', {**where, 'CTYPE3': 'FREQ', 'CRVAL3': 1.4e9, 'CTYPE4': 'STOKES', 'CRVAL4': 1}, np.ones((1, 1, 5, 7)))

# Sample images that come with astropy and photutils, as far as they have two axes and celestial coordinates.
samples = [os.path.join(os.path.dirname(astropy.__file__), part) for part in SAMPLES]
samples += glob.glob(os.path.join(os.path.dirname(astropy.__file__), '../photutils/**/*.fits*'), recursive=True)
for path in samples:
    with fits.open(path) as opened:
        hdu = next(h for h in opened if h.is_image and h.header.get('NAXIS') == 2 and WCS(h.header).has_celestial)
        shutil.copy(path, folder)
        say(os.path.basename(path), hdu.header, np.array(hdu.data, dtype=float))

for part in REFUSED:
    shutil.copy(os.path.join(os.path.dirname(astropy.__file__), part), folder)
refused = {os.path.basename(part): why for part, why in REFUSED.items()}
json.dump({'cases': cases, 'refused': refused}, sys.stdout)
