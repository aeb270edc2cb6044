import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** What the docstring of a function says. */
export interface Docstring {
  /** `room/file#function`. */
  id: string;
  summary: string;
  params: [name: string, text: string][];
  returns: string;
}

const SCIENCE = join(import.meta.dirname, '../src/science');

/**
 * Reads the docstrings of functions of the science room from its sources.
 *
 * @throws {Error} for a function that is not there or has no docstring
 */
export function readDocstrings(ids: readonly string[]): Docstring[] {
  return ids.map((id) => {
    const [file, name] = id.split('#');
    const text = readFileSync(join(SCIENCE, `${file}.ts`), 'utf8');
    const at = text.search(new RegExp(`^export function ${name}\\b`, 'm'));
    const before = text.slice(0, Math.max(0, at)).trimEnd();
    if (!before.endsWith('*/')) throw new Error(`${id} has no docstring`);
    return { id, ...parse(before.slice(before.lastIndexOf('/**'))) };
  });
}

/** Ids of the methods that a docstring names. */
export const methodsNamed = ({ summary }: Pick<Docstring, 'summary'>): string[] =>
  /Method: ([a-z-]+(?:, [a-z-]+)*)\./.exec(summary)?.[1]?.split(', ') ?? [];

function parse(docstring: string): Omit<Docstring, 'id'> {
  const lines = docstring
    .replace(/^\/\*\*|\*\/$/g, '')
    .split('\n')
    .map((line) => line.replace(/^\s*\* ?/, '').trim());
  const params: [string, string][] = [];
  const summary: string[] = [];
  let returns = '';
  let into: 'summary' | 'param' | 'returns' | 'throws' = 'summary';
  for (const line of lines) {
    const [, tag, rest] = /^@(\w+)\s*(.*)$/.exec(line) ?? [];
    if (tag === 'param') {
      const [, param, text] = /^(\S+)\s*(.*)$/.exec(rest!)!;
      params.push([param!, text!]);
      into = 'param';
    } else if (tag === 'returns') {
      returns = rest!;
      into = 'returns';
    } else if (tag) into = 'throws';
    else if (line === '') into = 'summary';
    else if (into === 'summary') summary.push(line);
    else if (into === 'param') params.at(-1)![1] += ` ${line}`;
    else if (into === 'returns') returns += ` ${line}`;
  }
  const plain = (text: string) => text.replace(/\{@link ([^}]+)\}/g, '$1').trim();
  return {
    summary: plain(summary.join(' ')),
    params: params.map(([param, text]) => [param, plain(text)]),
    returns: plain(returns),
  };
}
