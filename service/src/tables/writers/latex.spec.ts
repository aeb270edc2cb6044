import { describe, expect, it } from 'vitest';
import { escapeTex, writeLatex } from './latex.ts';
import type { OutputColumn } from './output-column.ts';

const columns: OutputColumn[] = [
  { name: 'name', datatype: 'text' },
  { name: 'd', datatype: 'double', unit: 'Mpc' },
  { name: 'e_d', datatype: 'double', errorOf: 'd' },
  { name: 'l_r', datatype: 'text', limitFlagOf: 'r' },
  { name: 'r', datatype: 'double', significant: 3 },
];
const layout = {
  caption: 'A & B',
  label: 'tab:x',
  comments: 'See \\citet{a}.',
  heads: { name: 'Source', d: '$D$', r: '$r$' },
};

async function texOf(rows: (string | number | null)[][]): Promise<string> {
  let text = '';
  for await (const piece of writeLatex(columns, rows, layout)) text += Buffer.from(piece).toString();
  return text;
}

describe('writeLatex', () => {
  it('puts an error behind its value to the same place, and a limit flag before it', async () => {
    const text = await texOf([
      ['S_1', 65, 2.9, '>', 352.6],
      ['S 2', null, null, null, 1.23e-7],
      ['S 3', 12, null, '<', 917000],
    ]);
    expect(text).toContain('S\\_1 & $65.0\\pm2.9$ & $>353$ \\\\');
    expect(text).toContain('S 2 & \\nodata & $1.23\\times10^{-7}$ \\\\');
    expect(text).toContain('S 3 & $12$ & $<9.17\\times10^{5}$\n\\enddata');
    expect(text).toContain('\\tablecaption{A \\& B\\label{tab:x}}');
    expect(text).toContain('\\colhead{(Mpc)}');
  });

  it('lets no text reach TeX as a command', () => {
    expect(escapeTex('\\input{x} 50% $a_b^c$ #1 ~ <é> 漢')).toBe(
      '\\textbackslash{}input\\{x\\} 50\\% \\$a\\_b\\textasciicircum{}c\\$ \\#1 \\textasciitilde{} $<$é$>$ ?',
    );
  });
});
