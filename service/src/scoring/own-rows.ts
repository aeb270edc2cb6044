import type { StarlightAssessment } from './assess.ts';
import type { NeighbourRow } from './surroundings.ts';

/** Rows that are the detection itself, the same source in another HI list, or its counterpart. */
export function ownRows(
  { detection, objects, accepted, probabilities }: StarlightAssessment,
  least: number,
): (row: NeighbourRow) => boolean {
  const j = probabilities.objects.findIndex((p) => p >= least);
  const counterpart = accepted ?? (j >= 0 ? objects[j]! : null);
  const sameVelocity = Math.max(50, detection.width50Kms > 0 ? detection.width50Kms / 2 : 0);
  return (row) => {
    const { input, index } = row.catalogue;
    if (input.kind === 'hi') {
      if (index === detection.catalogue) return row.index === detection.index;
      return row.separationArcsec <= detection.searchArcsec && Math.abs(row.velocityDifferenceKms) <= sameVelocity;
    }
    return (
      counterpart !== null && counterpart.rows.some((own) => own.catalogue === row.catalogue && own.index === row.index)
    );
  };
}
