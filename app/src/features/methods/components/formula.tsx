import { Fragment } from 'react';

/** A formula of plain signs, with `_{…}` low and `^{…}` high. */
export function Formula({ text }: { text: string }) {
  return (
    <>
      {text.split(/([_^]\{[^}]*\})/).map((piece, i) => {
        const inner = piece.slice(2, -1);
        if (piece.startsWith('_{')) return <sub key={i}>{inner}</sub>;
        if (piece.startsWith('^{')) return <sup key={i}>{inner}</sup>;
        return <Fragment key={i}>{piece}</Fragment>;
      })}
    </>
  );
}
