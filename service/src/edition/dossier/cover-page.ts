import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { allParameters } from '../methods/all-parameters.ts';
import type { DossierInput } from './dossier-input.ts';
import { AMBER, MUTED, type Pen } from './pen.ts';

const LEFT = 48;
const WIDTH = 499;
const BOTTOM = 800;

/** Cover: survey, what was frozen, criteria, inputs, methods, cautions. Returns after as many pages as it takes. */
export function coverPages(
  pen: Pen,
  { head, methods, archiveSha256, sources }: DossierInput,
  newPage: () => void,
): void {
  const { survey, run, criteria, inputs, note } = head;
  let y = pen.text('eremite', { x: LEFT, y: 56, width: WIDTH }, { face: 'mono', size: 10, colour: AMBER });
  y = pen.text(survey.name, { x: LEFT, y: y + 14, width: WIDTH }, { face: 'sans-bold', size: 26 });
  y = pen.text(
    `Edition ${head.number}: dossier of ${sources.length} ${sources.length === 1 ? 'source' : 'sources'}`,
    { x: LEFT, y: y + 2, width: WIDTH },
    { size: 14, colour: MUTED },
  );
  y = pen.text(note, { x: LEFT, y: y + 12, width: WIDTH, height: 60 }, { size: 10 });
  y = pen.text(SCREENING_CAUTION, { x: LEFT, y: y + 8, width: WIDTH }, { face: 'sans-bold', size: 10 });
  y += 14;
  const facts: [string, string][] = [
    ['Team', survey.team],
    ['Frozen', `${head.frozenAt.replace('T', ' ').slice(0, 16)} UTC by ${head.frozenBy}`],
    ['Run', `${run.number}, ${run.detections} detections, started by ${run.startedBy}; ${run.scoringVersion}`],
    ['Criteria', `${criteria.number}${criteria.note ? `: ${criteria.note}` : ''}`],
    ['Cosmology', `H0 ${survey.cosmology.h0} km/s/Mpc, Omega_m ${survey.cosmology.omegaM}, flat`],
    ['Input hash', run.inputHash],
    ['Ledger', `line ${head.ledgerHead.number}, ${head.ledgerHead.hash}`],
    ...(archiveSha256 ? [['Archive', `sha256 ${archiveSha256}`] as [string, string]] : []),
    ['Software', `Eremite ${head.software.version}`],
  ];
  for (const [name, value] of facts) {
    pen.text(name, { x: LEFT, y, width: 70 }, { size: 8.5, colour: MUTED });
    y = pen.text(value, { x: LEFT + 76, y, width: WIDTH - 76 }, { face: 'mono', size: 7.8 }) + 1.5;
  }
  const room = (needed: number) => {
    if (y + needed <= BOTTOM) return;
    newPage();
    y = 56;
  };
  y = pen.heading('Tables', { x: LEFT, y: y + 12, width: WIDTH });
  for (const { name, kind, rows, fileName, sha256, reference } of inputs) {
    room(30);
    y = pen.text(`${name}: ${kind}, ${rows} rows, ${fileName}`, { x: LEFT, y, width: WIDTH }, { size: 8.5 });
    const source = `sha256 ${sha256}${reference ? `; ${reference}` : ''}`;
    y = pen.text(source, { x: LEFT, y, width: WIDTH, height: 22 }, { face: 'mono', size: 6.8, colour: MUTED }) + 3;
  }
  room(140);
  y = pen.heading('Methods', { x: LEFT, y: y + 8, width: WIDTH });
  for (const part of paragraphs(methods)) {
    room(pen.height(part, WIDTH, { size: 8.5 }));
    y = pen.text(part, { x: LEFT, y, width: WIDTH }, { size: 8.5 }) + 2;
  }
  room(60);
  y = pen.heading('Every parameter', { x: LEFT, y: y + 8, width: WIDTH });
  const half = (WIDTH - 16) / 2;
  const parameters = allParameters(criteria.settings);
  for (let i = 0; i < parameters.length; i += 2) {
    room(9);
    for (const [column, parameter] of parameters.slice(i, i + 2).entries()) {
      const { key, value, unit } = parameter;
      const x = LEFT + column * (half + 16);
      pen.text(key, { x, y, width: 152, height: 9 }, { face: 'mono', size: 6.3, colour: MUTED });
      pen.text(`${value} ${unit}`.trim(), { x: x + 154, y, width: half - 154, height: 9 }, { face: 'mono', size: 6.3 });
    }
    y += 9;
  }
}

/** A long paragraph in pieces of a few sentences, so that a page break falls between sentences. */
function paragraphs(text: string): string[] {
  const sentences = text.split(/(?<=[.)]) (?=[A-Z])/);
  const pieces: string[] = [];
  for (let i = 0; i < sentences.length; i += 3) pieces.push(sentences.slice(i, i + 3).join(' '));
  return pieces;
}
