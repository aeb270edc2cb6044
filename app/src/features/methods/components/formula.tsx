import katex from 'katex';
import 'katex/dist/katex.min.css';
import { useMemo } from 'react';

/** A formula in TeX, set for the eye and as MathML for those who listen. The text is the project's own. */
export function Formula({ tex, display = false }: { tex: string; display?: boolean }) {
  const html = useMemo(() => katex.renderToString(tex, { displayMode: display, throwOnError: true }), [tex, display]);
  return <span dangerouslySetInnerHTML={{ __html: html }} />;
}
