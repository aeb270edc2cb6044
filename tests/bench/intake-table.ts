import { createWriteStream } from 'node:fs';
import { once } from 'node:events';
import { seeded } from '@eremite/service/matching/testing/brute-force.ts';

const HEAD = 'id,ra_deg,dec_deg,ra_err,gmag,gmag_err,rmag,rmag_err,redshift,r_eff,star_prob\n';
const ROWS_A_PIECE = 20_000;

/** Writes a CSV catalogue of about 103 bytes a row: a patch of 20 by 20 degrees, two bands, some cells empty. */
export async function writeCatalogue(path: string, rows: number): Promise<void> {
  const random = seeded(11);
  const file = createWriteStream(path);
  file.write(HEAD);
  for (let from = 0; from < rows; from += ROWS_A_PIECE) {
    let text = '';
    for (let i = from; i < Math.min(rows, from + ROWS_A_PIECE); i++) {
      const g = 14 + 10 * Math.sqrt(random());
      const redshift = random() < 0.3 ? (0.2 * random()).toFixed(6) : '';
      text +=
        `SRC${String(i).padStart(10, '0')},${(140 + 20 * random()).toFixed(8)},${(20 * random() - 10).toFixed(8)},` +
        `${(0.05 + 0.2 * random()).toFixed(4)},${g.toFixed(5)},${(0.01 + 0.1 * random()).toFixed(5)},` +
        `${(g - random()).toFixed(5)},${(0.01 + 0.1 * random()).toFixed(5)},${redshift},` +
        `${(0.5 + 5 * random()).toFixed(6)},${random().toFixed(8)}\n`;
    }
    if (!file.write(text)) await once(file, 'drain');
  }
  file.end();
  await once(file, 'close');
}
