/** What the YAML head of an ECSV file says about one column. */
export type EcsvColumn = Record<string, string>;

export interface EcsvHead {
  delimiter: string;
  columns: EcsvColumn[];
  frame?: string;
}

/**
 * Reads the part of an ECSV head (lines without their "# ") that matters here: the delimiter and the list of columns,
 * in block or flow style. It is no YAML reader; metadata are passed over.
 * @see https://github.com/astropy/astropy-APEs/blob/main/APE6.rst
 */
export function readEcsvHead(lines: string[]): EcsvHead {
  const delimiterLine = lines.find((line) => /^delimiter:/.test(line));
  const delimiter = delimiterLine === undefined ? ' ' : scalar(delimiterLine.replace(/^delimiter:\s*/, '')) || ' ';
  const begin = lines.findIndex((line) => /^datatype:/.test(line));
  const items: string[][] = [];
  if (begin >= 0) {
    for (const line of lines.slice(begin + 1)) {
      if (/^\s*-(\s|$)/.test(line) && indentOf(line) <= (items[0] ? indentOf(items[0][0]!) : 8)) items.push([line]);
      else if (/^\s/.test(line)) items.at(-1)?.push(line);
      else break;
    }
  }
  const columns = items.map((item) => {
    const text = [item[0]!.replace(/^\s*-\s?/, ''), ...item.slice(1)];
    return text[0]!.trim().startsWith('{') ? flowMap(text.map((line) => line.trim()).join(' ')) : blockMap(text);
  });
  const frame = /\bframe:\s*['"]?([A-Za-z]\w*)/.exec(lines.join('\n'))?.[1];
  return { delimiter, columns, ...(frame === undefined ? {} : { frame }) };
}

function indentOf(line: string): number {
  return line.length - line.trimStart().length;
}

function blockMap(lines: string[]): EcsvColumn {
  const map: EcsvColumn = {};
  const indent = Math.min(
    ...lines
      .slice(1)
      .filter((line) => line.trim() !== '')
      .map(indentOf),
    Infinity,
  );
  for (const [i, line] of lines.entries()) {
    if (i > 0 && indentOf(line) > indent) continue;
    const pair = /^\s*(\w+):\s*(.*)$/.exec(line);
    if (pair) map[pair[1]!] = scalar(pair[2]!);
  }
  return map;
}

/** {key: value, key: 'quoted, value', key: {nested: passed over}} */
function flowMap(text: string): EcsvColumn {
  const map: EcsvColumn = {};
  const item = /(\w+):\s*(?:'((?:[^']|'')*)'|"((?:[^"\\]|\\.)*)"|(\{[^}]*\}|\[[^\]]*\])|([^,}]*))\s*[,}]/g;
  for (const match of text.slice(1).matchAll(item)) {
    const [, key, single, double, nested, plain] = match;
    if (nested === undefined)
      map[key!] = single?.replaceAll("''", "'") ?? double?.replace(/\\(.)/g, '$1') ?? plain!.trim();
  }
  return map;
}

function scalar(text: string): string {
  const quoted = /^'((?:[^']|'')*)'|^"((?:[^"\\]|\\.)*)"/.exec(text.trim());
  if (quoted) return quoted[1]?.replaceAll("''", "'") ?? quoted[2]!.replace(/\\t/g, '\t').replace(/\\(.)/g, '$1');
  return text.trim();
}
