import type { Field } from '../contracts/field.ts';
import { agreementOf, rowKey, type SkyMark } from './sky-mark.ts';

/**
 * Marks of all objects of a field that are not among those of the verdict already.
 *
 * @param known marks of the verdict: they win over the same row of the field
 * @param windowKms largest velocity difference that agrees, km/s
 * @param kpcPerArcsec at the distance of the gas; null where there is none
 */
export function fieldMarks(
  { tables }: Pick<Field, 'tables'>,
  known: readonly SkyMark[],
  windowKms: number,
  kpcPerArcsec: number | null,
): SkyMark[] {
  const seen = new Set(known.map(({ key }) => key));
  return tables.flatMap((table) =>
    table.rowId.flatMap((rowId, i): SkyMark[] => {
      const key = rowKey({ catalogueId: table.catalogueId, rowId });
      if (seen.has(key)) return [];
      const separationArcsec = table.separationArcsec[i]!;
      const velocityDifferenceKms = table.velocityDifferenceKms[i]!;
      return [
        {
          key,
          role: 'field',
          catalogueId: table.catalogueId,
          name: table.objectName[i]!,
          kind: table.kind,
          raDeg: table.raDeg[i]!,
          decDeg: table.decDeg[i]!,
          separationArcsec,
          separationKpc: kpcPerArcsec === null ? null : separationArcsec * kpcPerArcsec,
          velocityDifferenceKms,
          magnitude: table.magnitude[i]!,
          band: table.band[i]!,
          isStar: table.isStar[i]!,
          agreement: agreementOf(velocityDifferenceKms, windowKms),
        },
      ];
    }),
  );
}
