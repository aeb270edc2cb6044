import { Button } from '@blueprintjs/core';
import { complain, say } from '#lib/toaster.ts';

/** The methods paragraph, ready to be copied. */
export function MethodsText({ text }: { text: string }) {
  const copy = () =>
    navigator.clipboard.writeText(text).then(
      () => void say('The methods paragraph is copied.'),
      (error: unknown) => void complain(error),
    );
  return (
    <div className="stack">
      <p className="prose edition__methods">{text}</p>
      <div className="row">
        <Button text="Copy" onClick={() => void copy()} />
      </div>
    </div>
  );
}
