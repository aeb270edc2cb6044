import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { violations } from './support/axe.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';
import { overflow } from './support/overflow.ts';
import { stopAtFailure } from './support/stop-at-failure.ts';

let browser: TestBrowser;
let page: Page;
let survey = '';
beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('lead');
});
afterAll(() => browser?.close());

const button = (name: string | RegExp) => page.getByRole('button', { name });
const heading = (name: string | RegExp) => page.getByRole('heading', { name });
const outcome = () => page.getByRole('complementary', { name: 'Outcome' });
const ready = () => outcome().getByText('ready', { exact: true }).waitFor();
const file = (name: string, content: string | Buffer) => ({
  name,
  mimeType: 'application/octet-stream',
  buffer: Buffer.from(content),
});

/** Hands files to the intake; the wizard of the first is waited for. */
async function bringIn(...files: ReturnType<typeof file>[]): Promise<void> {
  await page.goto(`${survey}/intake`);
  await heading('Drop a table here').waitFor();
  await page.getByLabel('Table file').setInputFiles(files);
}
async function wizard(name: string): Promise<void> {
  await heading(name).waitFor();
  await heading('As it stands').waitFor();
}
async function publish(): Promise<void> {
  await button(/^Publish/).click();
  await page.waitForURL(/\/catalogues\/[0-9a-f-]{36}/);
}
/** Text of what a click downloads. */
async function download(link: string): Promise<string> {
  const [saved] = await Promise.all([
    page.waitForEvent('download'),
    page
      .getByRole('link', { name: link })
      .or(page.getByRole('button', { name: link }))
      .click(),
  ]);
  return readFileSync(await saved.path(), 'utf8');
}
async function fitsAndIsAccessible(): Promise<void> {
  expect(await violations(page)).toEqual([]);
  expect(await overflow(page)).toEqual([]);
}

const HI = [
  'name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr',
  'W 01,150.000,2.000,3000,80,2.1,12',
  'W 01b,150.002,2.000,3020,80,2.4,20',
  'W 02,152.000,3.000,4000,90,1.2,9',
  'W 03,154.000,4.000,900,60,5.0,30',
  'W 03b,154.001,4.000,905,60,5.1,28',
].join('\n');

/** Galaxies of one square degree whose counts rise to 22 mag and stop. */
function galaxies(count: number, firstRa: number): string {
  const rows = Array.from({ length: count }, (_, i) => {
    const mag = 22 + Math.log10((i + 0.5) / count) / 0.6;
    const [x, y] = [(i * 0.754877666) % 1, (i * 0.569840291) % 1];
    return `g${i},${(firstRa + x).toFixed(5)},${(1.5 + y).toFixed(5)},${mag.toFixed(3)},${i % 3 ? 'G' : 'S'}`;
  });
  return `id,ra_deg,dec_deg,rmag,type\n${rows.join('\n')}\n`;
}

describe('the intake of a new survey', () => {
  stopAtFailure();

  it('shows the sources that are in an HI list twice, and merges those the lead does not keep apart', async () => {
    await page.goto('/surveys');
    await button('New survey').click();
    await page.getByRole('dialog').getByLabel('Name').fill('Wren Strip');
    await button('Create survey').click();
    await page.waitForURL(/\/surveys\/[0-9a-f-]{36}/);
    await heading('Wren Strip').waitFor();
    survey = new URL(page.url()).pathname.replace(/\/$/, '');
    await bringIn(file('wren-hi.csv', HI));
    await wizard('wren-hi.csv');
    await page.getByLabel('What it lists').selectOption('hi');
    await page.getByLabel('Beam, major axis').fill('45');
    const pairs = page.getByRole('region', { name: 'Rows that seem one source' });
    await pairs.getByText('W 01b').waitFor();
    expect(await pairs.getByRole('row').count()).toBe(3);
    await fitsAndIsAccessible();
    await page.getByLabel('Keep only the better row').check({ force: true });
    await button('Publish 3 rows').waitFor();
    await page.getByLabel('Row 5 is a source of its own').check({ force: true });
    await button('Publish 4 rows').waitFor();
    await publish();
    const aside = page.getByRole('region', { name: 'Sidelined rows' });
    await aside.getByText('row 2', { exact: true }).first().waitFor();
  });

  it('saves the positions of the detections as CSV and VOTable, to ask an archive', async () => {
    await page.goto(`${survey}/intake`);
    const panel = page.getByRole('region', { name: 'Ask an archive' });
    await panel.getByLabel('Radius').fill('90');
    const csv = (await download('Save as CSV')).trim().split(/\r?\n/);
    expect(csv).toHaveLength(5);
    expect(csv[1]).toMatch(/W 01b,150.002,2,90/);
    expect(await download('Save as VOTable')).toMatch(/<TR>/);
    await fitsAndIsAccessible();
  });

  it('reads several files as parts of one catalogue, draws its counts and its region, and takes the depth found', async () => {
    await bringIn(file('tile-1.csv', galaxies(9000, 149.5)), file('tile-2.csv', galaxies(9000, 150.5)));
    await page.getByRole('dialog').getByText('tile-2.csv').waitFor();
    await page.getByRole('button', { name: 'Parts of one catalogue' }).click();
    await wizard('tile-1.csv');
    const parts = page.getByRole('list', { name: 'Files of this catalogue' });
    expect(await parts.getByRole('listitem').count()).toBe(2);
    await page.getByLabel('What it lists').selectOption('optical');
    await page.getByRole('img', { name: /r: 18\s?000 magnitudes/ }).waitFor();
    await button(/^Take 21\.\d as the depth/).click();
    expect(await page.getByLabel('Depth, 5 sigma').inputValue()).toMatch(/^21\.\d$/);
    // A correction by hand takes the place of what was found.
    await page.getByLabel('Depth, 5 sigma').fill('22.3');
    await outcome()
      .getByText(/depth of r is not stated/)
      .waitFor({ state: 'detached' });
    await page.getByRole('img', { name: /Coverage: \d+ cells/ }).waitFor();
    await page.getByText(/square degrees: the region holds|square degrees:/).waitFor();
    await ready();
    await fitsAndIsAccessible();
    await page.getByRole('button', { name: 'Take out tile-2.csv' }).click();
    await page.getByRole('img', { name: /r: 9\s?000 magnitudes/ }).waitFor();
    await page.getByLabel('Further files of the catalogue').setInputFiles([file('wrong.csv', 'a,b\n1,2\n')]);
    await page.getByText(/"wrong.csv" does not have the columns of "tile-1.csv"/).waitFor();
    await page.getByLabel('Further files of the catalogue').setInputFiles([file('tile-2.csv', galaxies(9000, 150.5))]);
    await page.getByRole('img', { name: /r: 18\s?000 magnitudes/ }).waitFor();
  });

  it('leads to the filter that keeps no row, and says what the column holds', async () => {
    await page.getByLabel('Keep only rows where').selectOption('type');
    await page.getByLabel('is one of (type)').fill('galaxy');
    const question = outcome().getByRole('listitem').filter({ hasText: 'No row has "galaxy" in "type"' });
    await question.waitFor();
    expect(await button(/^Publish/).isDisabled()).toBe(true);
    await page.getByLabel('Name').focus();
    await question.getByRole('button', { name: 'go there' }).click();
    const filter = page.getByLabel('is one of (type)');
    expect(await filter.evaluate((input) => input === document.activeElement)).toBe(true);
    await filter.fill('G');
    await button(/^Publish 12\s?000 rows/).waitFor();
  });

  it('takes cones around the detections for the footprint, and a MOC from a file', async () => {
    await page.getByLabel('Footprint').selectOption('cones');
    await page.getByLabel('Radius of the cones').fill('300');
    await page.getByText(/the 4 cones of 300 arcsec around the detections; what lies outside/).waitFor();
    await page.getByLabel('Footprint').selectOption('moc');
    await page.getByLabel('MOC file').setInputFiles([file('region.txt', '4/1024-1030\n')]);
    await page.getByText(/square degrees: the region given/).waitFor();
    expect(await page.getByLabel('The MOC').inputValue()).toBe('4/1024-1030');
    await page.getByLabel('Footprint').selectOption('circles');
    await page.getByLabel('The circles').fill('150.5 2 oops');
    await page.getByLabel('Reference').focus();
    await page.getByText('Line 1: expected 3 numbers').waitFor();
    await page.getByLabel('The circles').fill('150.5 2 1.5');
    await page.getByLabel('Reference').focus();
    await page.getByText(/7\.07 square degrees: the circles given/).waitFor();
    await publish();
    await heading('tile-1').waitFor();
    await page.getByText('tile-2.csv').first().waitFor();
    await fitsAndIsAccessible();
  });

  it('brings in a new version of a table, which takes its place', async () => {
    await page.getByRole('link', { name: 'Bring in a new version' }).click();
    await page.getByText('Bring in the new version of “tile-1”').waitFor();
    await page.getByLabel('Table file').setInputFiles([file('again.csv', galaxies(3000, 150))]);
    await wizard('again.csv');
    // The settings are those of the table with the same header.
    await page.getByText(/The settings are those of "tile-1.csv"/).waitFor();
    const version = page.getByLabel('New version of');
    expect(await version.evaluate((select: HTMLSelectElement) => select.selectedOptions[0]?.text)).toBe('tile-1');
    await page.getByLabel('Keep only rows where').selectOption('');
    await button(/^Publish 3\s?000 rows/).waitFor();
    await ready();
    await publish();
    await page.getByRole('link', { name: 'Catalogues', exact: true }).click();
    await page.getByText('optical, superseded').waitFor();
  });

  it('reads a data file with the ReadMe dropped beside it', async () => {
    const readMe = [
      '================================================================================',
      'Byte-by-byte Description of file: table1.dat',
      '--------------------------------------------------------------------------------',
      '   Bytes Format Units   Label     Explanations',
      '--------------------------------------------------------------------------------',
      '   1-  3  A3    ---     Name      Name of the source',
      '   5- 10  F6.2  deg     RAdeg     Right ascension (J2000)',
      '  12- 16  F5.2  deg     DEdeg     Declination (J2000)',
      '--------------------------------------------------------------------------------',
    ].join('\n');
    await bringIn(file('ReadMe', readMe), file('table1.dat', 'A 1 150.25  2.50\nB 2 151.75 -2.50\n'));
    await wizard('table1.dat');
    await page.getByText('Described by').waitFor();
    expect(await page.getByLabel('Role of RAdeg').inputValue()).toBe('ra');
  });

  it('asks before it takes what there is of a file that breaks off', async () => {
    const whole = `<?xml version="1.0"?><VOTABLE version="1.4"><RESOURCE><TABLE><FIELD name="ra_deg" datatype="double" unit="deg"/><FIELD name="dec_deg" datatype="double" unit="deg"/><DATA><TABLEDATA><TR><TD>150</TD><TD>2</TD></TR><TR><TD>151</TD><TD>2</TD></TR><TR><TD>15`;
    await bringIn(file('cut.vot', whole));
    await wizard('cut.vot');
    await page.getByLabel('What it lists').selectOption('groups');
    await outcome().getByText('not ready').waitFor();
    await outcome().getByLabel('Take the rows before the break').check({ force: true });
    await ready();
    await button('Publish 2 rows').waitFor();
  });

  it('met no error of a script and asked no other host', () => {
    expect(browser.complaints()).toEqual([]);
  });
});
