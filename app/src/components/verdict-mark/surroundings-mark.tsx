import type { SurroundingsVerdict } from '@eremite/shared/contracts/words';

const STROKES: Record<SurroundingsVerdict, string[]> = {
  alone: ['M7 13L10 3'],
  accompanied: ['M4.5 13L7.5 3', 'M10 13L11.6 7.5'],
  'in a group': ['M3 13L6 3', 'M7.4 13L9.6 5.5', 'M11.4 13L13 7.5'],
  'in a cluster': ['M2 13L4.6 4', 'M5.4 13L8.4 3', 'M9 13L11.6 4', 'M12.4 13L14.4 6'],
  'cannot tell': ['M7 13L10 3'],
};

/** The strokes of a surroundings verdict. Decoration: the word always stands beside it. */
export function SurroundingsMark({ verdict, size = 16 }: { verdict: SurroundingsVerdict; size?: number }) {
  const unsure = verdict === 'cannot tell';
  return (
    <svg className="mark" width={size} height={size} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      {STROKES[verdict].map((path) => (
        <path
          key={path}
          d={path}
          className={unsure ? 'mark__unsure' : 'mark__stroke'}
          strokeDasharray={unsure ? '2 2' : undefined}
        />
      ))}
    </svg>
  );
}
