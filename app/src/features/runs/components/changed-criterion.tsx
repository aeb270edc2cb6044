import { CRITERIA_FIELDS, valueText } from '#lib/criteria/criteria-fields.ts';

interface ChangedCriterionProps {
  /** `section.key` of the criteria. */
  name: string;
  from: unknown;
  to: unknown;
}

/** One criterion that differs between two runs, in the words of the form; a key unknown here is shown as it is. */
export function ChangedCriterion({ name, from, to }: ChangedCriterionProps) {
  const field = CRITERIA_FIELDS.find(({ section, key }) => `${section}.${key}` === name);
  const text = (value: unknown) => (field ? valueText(field, value) : JSON.stringify(value));
  return (
    <div style={{ display: 'contents' }}>
      <dt title={name}>{field?.title ?? name}</dt>
      <dd className={field?.kind === 'choice' ? undefined : 'mono'}>
        {text(from)} → {text(to)} {field?.unit}
      </dd>
    </div>
  );
}
