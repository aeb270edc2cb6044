import { CRITERIA_FIELDS, valueText } from '#lib/criteria/criteria-fields.ts';
import type { MethodEntry } from '@eremite/shared/science/method-entry';
import { Formula } from './formula.tsx';
import { Functions } from './functions.tsx';

/** One method: what it is for, its formulas with their symbols, its settings with their defaults, where it holds. */
export function MethodSheet({ entry }: { entry: MethodEntry }) {
  const fields = CRITERIA_FIELDS.filter(({ section, key }) => entry.criteria.includes(`${section}.${key}`));
  return (
    <section id={entry.id} className="panel method" aria-labelledby={`method-${entry.id}`}>
      <div className="panel__head">
        <h2 id={`method-${entry.id}`} tabIndex={-1}>
          {entry.title}
        </h2>
      </div>
      <div className="panel__body stack">
        <p>{entry.summary}</p>
        <ul className="method__formulas" aria-label="Formulas" tabIndex={0}>
          {entry.formulas.map((formula) => (
            <li key={formula}>
              <Formula tex={formula} display />
            </li>
          ))}
        </ul>
        <dl className="method__symbols" aria-label="Symbols">
          {entry.symbols.map(([symbol, meaning, unit]) => (
            <div key={symbol}>
              <dt>
                <Formula tex={symbol} />
              </dt>
              <dd>{meaning}</dd>
              <dd className="mono small muted">{unit}</dd>
            </div>
          ))}
        </dl>
        {fields.length > 0 && (
          <table className="method__settings">
            <caption>Settings of the criteria</caption>
            <thead>
              <tr>
                <th scope="col">Setting</th>
                <th scope="col">Default</th>
                <th scope="col">Source</th>
              </tr>
            </thead>
            <tbody>
              {fields.map((field) => (
                <tr key={`${field.section}.${field.key}`}>
                  <th scope="row">{field.title}</th>
                  <td className={field.kind === 'choice' ? undefined : 'mono'}>
                    {valueText(field, field.standard)} {field.standard !== null && field.unit}
                  </td>
                  <td className="muted">{field.source}</td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
        <p>
          <b>Where it holds.</b> {entry.validity}
        </p>
        {entry.columns.length > 0 && (
          <p>
            <b>Makes</b> <span className="mono">{entry.columns.join(', ')}</span>
          </p>
        )}
        <Functions ids={entry.functions} />
        <p className="muted small">{entry.sources.join(' · ')}</p>
      </div>
    </section>
  );
}
