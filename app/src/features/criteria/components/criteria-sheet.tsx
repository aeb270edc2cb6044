import { CRITERIA_SECTIONS, type CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { CRITERIA_FIELDS, isStandard, valueOf } from '#lib/criteria/criteria-fields.ts';
import { CriteriaRow } from './criteria-row.tsx';
import { SectionNav } from './section-nav.tsx';
import './criteria.css';

/** Saved criteria, for reading: they never change. */
export function CriteriaSheet({ settings }: { settings: CriteriaSettings }) {
  const changed = CRITERIA_FIELDS.filter((field) => !isStandard(field, valueOf(settings, field)));
  return (
    <div className="criteria">
      <SectionNav changed={changed} />
      <div className="stack">
        {CRITERIA_SECTIONS.map((section) => (
          <section key={section} id={`section-${section}`} className="panel" aria-labelledby={`title-${section}`}>
            <div className="panel__head">
              <h2 id={`title-${section}`}>{section}</h2>
            </div>
            {CRITERIA_FIELDS.filter((field) => field.section === section).map((field) => (
              <CriteriaRow key={field.key} field={field} value={valueOf(settings, field)} fault={undefined} />
            ))}
          </section>
        ))}
      </div>
    </div>
  );
}
