import type { DoubtGrade } from '@eremite/shared/contracts/words';
import './doubt-mark.css';

const CLASSES: Record<DoubtGrade, string> = {
  serious: 'serious',
  watch: 'watch',
  clear: 'clear',
  'not testable here': 'untested',
};

/** Square of a doubt: full = serious, half = watch, open = clear, dashed = not testable here. */
export function DoubtMark({ grade }: { grade: DoubtGrade }) {
  return <span className={`doubt-mark doubt-mark--${CLASSES[grade]}`} aria-hidden="true" />;
}

/** Doubts in one line, worst first, each by name and grade. */
export function DoubtFlags({ doubts }: { doubts: readonly { name: string; grade: DoubtGrade }[] }) {
  const order: DoubtGrade[] = ['serious', 'watch', 'not testable here', 'clear'];
  const sorted = [...doubts].sort((a, b) => order.indexOf(a.grade) - order.indexOf(b.grade));
  if (sorted.length === 0) return <span className="muted">none</span>;
  return (
    <span className="doubt-flags">
      {sorted.map(({ name, grade }) => (
        <span key={name} title={`${name}: ${grade}`}>
          <DoubtMark grade={grade} />
          {name}
          <span className="visually-hidden">: {grade}</span>
        </span>
      ))}
    </span>
  );
}
