import { CRITERIA_SECTIONS, criteriaSettings, type CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { z } from 'zod';

/** One key of the criteria with what the schema says of it. */
export interface CriteriaField {
  section: keyof CriteriaSettings;
  key: string;
  title: string;
  unit: string;
  description: string;
  source: string;
  standard: unknown;
  kind: 'choice' | 'switch' | 'number' | 'numbers' | 'words' | 'bands';
  /** Values of an enum with their words. */
  choices: { value: string; label: string }[];
  /** Whether it may be left empty. */
  optional: boolean;
  minimum?: number;
  maximum?: number;
}

interface KeySchema {
  title?: string;
  unit?: string;
  description?: string;
  source?: string;
  choices?: Record<string, string>;
  type?: string;
  enum?: string[];
  minimum?: number;
  maximum?: number;
  items?: KeySchema;
  anyOf?: KeySchema[];
}

function kindOf(schema: KeySchema): CriteriaField['kind'] {
  if (schema.enum) return 'choice';
  if (schema.type === 'boolean') return 'switch';
  if (schema.type !== 'array') return 'number';
  if (schema.items?.type === 'object') return 'bands';
  return schema.items?.type === 'string' ? 'words' : 'numbers';
}

/** The form is made from the contract itself, so that a new key needs no work here. */
function readFields(): CriteriaField[] {
  const root = z.toJSONSchema(criteriaSettings, { io: 'input' }) as {
    properties: Record<string, { properties: Record<string, KeySchema> }>;
  };
  const standard = criteriaSettings.parse({}) as unknown as Record<string, Record<string, unknown>>;
  return CRITERIA_SECTIONS.flatMap((section) =>
    Object.entries(root.properties[section]!.properties).map(([key, outer]): CriteriaField => {
      const inner = outer.anyOf?.find(({ type }) => type !== 'null') ?? outer;
      return {
        section,
        key,
        title: outer.title ?? key,
        unit: outer.unit ?? '',
        description: outer.description ?? '',
        source: outer.source ?? '',
        standard: standard[section]![key],
        kind: kindOf(inner),
        choices: (inner.enum ?? []).map((value) => ({ value, label: outer.choices?.[value] ?? value })),
        optional: outer.anyOf !== undefined,
        ...(inner.minimum === undefined ? {} : { minimum: inner.minimum }),
        ...(inner.maximum === undefined ? {} : { maximum: inner.maximum }),
      };
    }),
  );
}

export const CRITERIA_FIELDS = readFields();

export const valueOf = (settings: CriteriaSettings, field: CriteriaField): unknown =>
  (settings[field.section] as Record<string, unknown>)[field.key];

export const isStandard = (field: CriteriaField, value: unknown): boolean =>
  JSON.stringify(value) === JSON.stringify(field.standard);

/** A value in words: what a reader sees of criteria that are not being edited. */
export function valueText(field: CriteriaField, value: unknown): string {
  if (value === null || value === undefined) return 'not set';
  if (typeof value === 'boolean') return value ? 'on' : 'off';
  if (field.kind === 'bands') {
    const bands = value as { lowMhz: number; highMhz: number; name: string }[];
    return bands.length === 0 ? 'none' : bands.map((b) => `${b.lowMhz}–${b.highMhz} ${b.name}`.trim()).join(', ');
  }
  if (Array.isArray(value)) return value.join(', ');
  if (field.kind === 'choice') return field.choices.find((choice) => choice.value === value)?.label ?? String(value);
  return String(value);
}
