import { METHODS } from '../methods.ts';

/** Every derived column and field of a verdict, with the method that makes it. */
export function ColumnIndex() {
  const columns = METHODS.flatMap(({ id, title, columns: names }) => names.map((name) => ({ name, id, title }))).sort(
    (a, b) => a.name.localeCompare(b.name),
  );
  return (
    <section className="panel method" id="columns" aria-labelledby="method-columns">
      <div className="panel__head">
        <h2 id="method-columns">Columns and their methods</h2>
      </div>
      <div className="panel__body">
        <ul className="method__columns">
          {columns.map(({ name, id, title }) => (
            <li key={name} id={`column-${name}`}>
              <span className="mono">{name}</span> <a href={`#${id}`}>{title}</a>
            </li>
          ))}
        </ul>
      </div>
    </section>
  );
}
