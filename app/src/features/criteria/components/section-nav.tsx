import { CRITERIA_SECTIONS } from '@eremite/shared/contracts/criteria';
import type { ReactNode } from 'react';
import type { CriteriaField } from '#lib/criteria/criteria-fields.ts';

/** Jumps to a section; says how much of it differs from the defaults. */
export function SectionNav({ changed, children }: { changed: readonly CriteriaField[]; children?: ReactNode }) {
  return (
    <nav className="criteria__nav" aria-label="Sections">
      <ul>
        {CRITERIA_SECTIONS.map((section) => {
          const differing = changed.filter((field) => field.section === section).length;
          return (
            <li key={section}>
              <a href={`#section-${section}`}>{section}</a>
              {differing > 0 && <span className="num criteria__differs">{differing}</span>}
            </li>
          );
        })}
      </ul>
      {children}
    </nav>
  );
}
