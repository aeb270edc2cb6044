import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { describe, expect, it } from 'vitest';
import { CRITERIA_FIELDS, isStandard, valueOf, valueText } from './criteria-fields.ts';

describe('the form of the criteria', () => {
  it('has every key of the contract, each with a title, a sentence and a source', () => {
    const keys = Object.entries(criteriaSettings.parse({})).flatMap(([section, values]) =>
      Object.keys(values).map((key) => `${section}.${key}`),
    );
    expect(CRITERIA_FIELDS.map(({ section, key }) => `${section}.${key}`).sort()).toEqual(keys.sort());
    expect(CRITERIA_FIELDS.filter(({ title, description, source }) => !title || !description || !source)).toEqual([]);
  });

  it('marks as standard exactly what was not changed', () => {
    const settings = criteriaSettings.parse({ surroundings: { radiusMpc: 1.5 } });
    const changed = CRITERIA_FIELDS.filter((field) => !isStandard(field, valueOf(settings, field)));
    expect(changed.map(({ key }) => key)).toEqual(['radiusMpc']);
  });

  it('has words for every value of every choice', () => {
    const choices = CRITERIA_FIELDS.filter(({ kind }) => kind === 'choice');
    expect(choices.length).toBeGreaterThan(0);
    expect(choices.flatMap((field) => field.choices.filter(({ value, label }) => value === label))).toEqual([]);
    const frame = choices.find(({ key }) => key === 'hubbleFrame')!;
    expect(valueText(frame, 'cmb')).toBe('Microwave background');
  });
});
