/** Writes the docstrings that the methods page shows: `npm run methods`. */
import { writeFileSync } from 'node:fs';
import { METHODS } from '../../app/src/features/methods/methods.ts';
import { readDocstrings } from './read-docstrings.ts';

const ids = [...new Set(METHODS.flatMap(({ functions }) => functions))];
const text = `/** Docstrings of the science room, written by \`npm run methods\`; a test holds them to the source. */
export const DOCSTRINGS: { id: string; summary: string; params: [string, string][]; returns: string }[] = ${JSON.stringify(readDocstrings(ids), null, 2)};
`;
writeFileSync(new URL('../../app/src/features/methods/docstrings.ts', import.meta.url), text);
