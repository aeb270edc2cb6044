const Glyph = ({ children }: { children: React.ReactNode }) => (
  <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
    {children}
  </svg>
);

const ENTRIES = [
  { word: 'optical', glyph: <circle cx="7" cy="7" r="4" /> },
  { word: 'infrared', glyph: <path d="M7 2v10M2 7h10" /> },
  { word: 'ultraviolet', glyph: <path d="M7 2l4.6 8H2.4z" /> },
  { word: 'continuum', glyph: <path d="M3 3h8v8H3z" /> },
  { word: 'gas', glyph: <path d="M7 2l5 5-5 5-5-5z" /> },
  { word: 'star', glyph: <path d="M3 3l8 8M11 3l-8 8" /> },
];

/** What shapes, filling and hatching mean. */
export function SkyLegend({ id, uncovered }: { id: string; uncovered: string[] }) {
  return (
    <figcaption id={id} className="sky-legend">
      {ENTRIES.map(({ word, glyph }) => (
        <span key={word} className="sky-legend__none">
          <Glyph>{glyph}</Glyph>
          {word}
        </span>
      ))}
      <span className="sky-legend__concordant">
        <Glyph>
          <circle cx="7" cy="7" r="4" />
        </Glyph>
        velocity agrees
      </span>
      <span className="sky-legend__other">
        <Glyph>
          <circle cx="7" cy="7" r="4" />
        </Glyph>
        velocity differs
      </span>
      <span title={uncovered.join(', ')}>
        <i className="sky-legend__hatch" aria-hidden="true" />
        {'masked or not observed'}
      </span>
      <span>
        <kbd>[</kbd> <kbd>]</kbd> step <kbd>M</kbd> measure
      </span>
    </figcaption>
  );
}
