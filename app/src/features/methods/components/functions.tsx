import { DOCSTRINGS } from '../docstrings.ts';

/** What the code says of itself: the docstrings of the functions that carry a method out. */
export function Functions({ ids }: { ids: readonly string[] }) {
  const found = DOCSTRINGS.filter(({ id }) => ids.includes(id));
  return (
    <details className="method__code">
      <summary>In the code: {found.length === 1 ? 'one function' : `${found.length} functions`}</summary>
      {found.map(({ id, summary, params, returns }) => {
        const [file, name] = id.split('#');
        return (
          <section key={id}>
            <h3 className="mono">
              {name} <span className="muted">{file}</span>
            </h3>
            <p>{summary}</p>
            <dl>
              {params.map(([param, text]) => (
                <div key={param}>
                  <dt className="mono">{param}</dt>
                  <dd>{text}</dd>
                </div>
              ))}
              {returns && (
                <div>
                  <dt>gives</dt>
                  <dd>{returns}</dd>
                </div>
              )}
            </dl>
          </section>
        );
      })}
    </details>
  );
}
