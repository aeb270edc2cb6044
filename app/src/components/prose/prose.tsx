import { Fragment } from 'react';

/** Plain signs as they are printed: plus-minus, and a true minus before a number. */
const typeset = (text: string) =>
  text
    .replaceAll('+/-', '±')
    .replaceAll('->', '→')
    .replace(/(^|[\s(])-(?=\d)/g, '$1−');

/** A sentence of the service with its signs and subscripts set: `M_HI` becomes M with a low HI. */
export function Prose({ text }: { text: string }) {
  const pieces = typeset(text).split(/(\b[A-Za-z]{1,3}_(?:[A-Za-z0-9]+|\*))/);
  return (
    <>
      {pieces.map((piece, i) => {
        if (i % 2 === 0) return <Fragment key={i}>{piece}</Fragment>;
        const [base, low] = piece.split('_');
        return (
          <span key={i}>
            {base}
            <sub>{low}</sub>
          </span>
        );
      })}
    </>
  );
}
