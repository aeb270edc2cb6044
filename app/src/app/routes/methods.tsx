import { useEffect } from 'react';
import { useLocation } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { ColumnIndex } from '#features/methods/components/column-index.tsx';
import { MethodSheet } from '#features/methods/components/method-sheet.tsx';
import { METHODS } from '#features/methods/methods.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/methods/components/methods.css';

export function Component() {
  const { hash } = useLocation();
  useTitle('Methods');
  // The page is there only after the address is: the browser itself found nothing to go to.
  useEffect(() => {
    if (hash) document.getElementById(decodeURIComponent(hash.slice(1)))?.scrollIntoView();
  }, [hash]);
  return (
    <main id="content" className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Methods</h1>
          <p className="page__lede">
            What stands behind each number: formula, symbols, settings with their defaults, and where it holds.
          </p>
        </div>
      </div>
      <div className="methods">
        <nav className="methods__nav" aria-label="Methods">
          <ul>
            {METHODS.map(({ id, title }) => (
              <li key={id}>
                <a href={`#${id}`}>{title}</a>
              </li>
            ))}
            <li>
              <a href="#columns">Columns and their methods</a>
            </li>
          </ul>
        </nav>
        <div className="stack">
          {METHODS.map((entry) => (
            <MethodSheet key={entry.id} entry={entry} />
          ))}
          <ColumnIndex />
        </div>
      </div>
      <Caution />
    </main>
  );
}
