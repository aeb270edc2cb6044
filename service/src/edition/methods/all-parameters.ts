import { criteriaSettings, type CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { z } from 'zod';

export interface Parameter {
  /** `section.key`. */
  key: string;
  title: string;
  unit: string;
  value: string;
  source: string;
}

/** Every setting of the criteria with its value, in the order of the form. */
export function allParameters(settings: CriteriaSettings): Parameter[] {
  return Object.entries(criteriaSettings.shape).flatMap(([section, schema]) =>
    Object.entries(objectOf(schema).shape).map(([key, field]) => {
      const facts = (field as z.ZodType).meta() ?? {};
      const value = (settings as unknown as Record<string, Record<string, unknown>>)[section]?.[key];
      return {
        key: `${section}.${key}`,
        title: String(facts['title'] ?? key),
        unit: String(facts['unit'] ?? ''),
        value: valueText(value),
        source: String(facts['source'] ?? ''),
      };
    }),
  );
}

/** Sections are wrapped in their defaults. */
function objectOf(schema: unknown): z.ZodObject {
  let inner = schema as z.ZodType & { unwrap?: () => z.ZodType };
  while (!(inner instanceof z.ZodObject)) inner = inner.unwrap!() as typeof inner;
  return inner;
}

function valueText(value: unknown): string {
  if (value === null || value === undefined) return 'not set';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') return Math.abs(value) >= 1e6 ? String(Number(value.toPrecision(4))) : String(value);
  if (Array.isArray(value)) return value.length === 0 ? 'none' : value.map(valueText).join(', ');
  return typeof value === 'object' ? JSON.stringify(value) : String(value as string);
}
