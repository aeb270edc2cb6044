import type { IntakeColumn } from '@eremite/shared/contracts/intake';
import { describe, expect, it } from 'vitest';
import { assign, readAssignment, takesUnit, withUnit, writeAssignment } from './column-assignment.ts';

const column = (name: string, guess: string | null): IntakeColumn => ({
  name,
  guess,
  unit: null,
  ucd: null,
  description: null,
  type: 'number',
  confidence: guess ? 0.9 : 0,
});
const COLUMNS = [
  column('id', 'name'),
  column('ra', 'ra'),
  column('rmag', 'magnitude:r'),
  column('e_rmag', 'magnitudeError:r'),
  column('x', null),
];

describe('the roles of columns', () => {
  it('are the guesses where the settings are silent', () => {
    expect(readAssignment(COLUMNS, {})).toEqual({
      id: 'name',
      ra: 'ra',
      rmag: 'magnitude:r',
      e_rmag: 'magnitudeError:r',
      x: null,
    });
  });

  it('stay none where the settings say none, though there is a guess', () => {
    expect(readAssignment(COLUMNS, { columns: { name: null } })['id']).toBeNull();
  });

  it('survive being written and read again', () => {
    const moved = assign(readAssignment(COLUMNS, {}), 'x', 'velocity');
    expect(readAssignment(COLUMNS, { columns: writeAssignment(moved) })).toEqual(moved);
  });

  it('belong to one column only', () => {
    const moved = assign(readAssignment(COLUMNS, {}), 'x', 'ra');
    expect([moved['ra'], moved['x']]).toEqual([null, 'ra']);
  });

  it('keep a magnitude with its error and its band', () => {
    expect(writeAssignment(readAssignment(COLUMNS, {})).magnitudes).toEqual([
      { column: 'rmag', error: 'e_rmag', limitFlag: null, band: 'r' },
    ]);
  });
});

describe('the unit of a column', () => {
  it('can be given for what has one', () => {
    expect(['ra', 'distance', 'velocity', 'flux', 'magnitude:r'].filter(takesUnit)).toHaveLength(5);
    expect(['name', 'redshift', 'decSign', 'raHours', 'magnitudeError:r', 'magnitudeLimit:r'].some(takesUnit)).toBe(
      false,
    );
  });

  it('is put in beside the others, and taken out again', () => {
    const units = withUnit({ velocity: 'm/s' }, 'distance', 'kpc');
    expect(units).toEqual({ velocity: 'm/s', distance: 'kpc' });
    expect(withUnit(units, 'velocity', undefined)).toEqual({ distance: 'kpc' });
    expect(withUnit({ distance: 'kpc' }, 'distance', undefined)).toBeUndefined();
  });
});
