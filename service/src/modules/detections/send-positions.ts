import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { positionsQuery } from '@eremite/shared/contracts/detection';
import type { Response } from 'express';
import type { z } from 'zod';
import { writeCsv } from '../../tables/writers/csv.ts';
import type { OutputColumn } from '../../tables/writers/output-column.ts';
import { writeVotable } from '../../tables/writers/votable.ts';

const COLUMNS: OutputColumn[] = [
  { name: 'name', datatype: 'text', ucd: 'meta.id;meta.main' },
  { name: 'ra', datatype: 'double', unit: 'deg', ucd: 'pos.eq.ra;meta.main' },
  { name: 'dec', datatype: 'double', unit: 'deg', ucd: 'pos.eq.dec;meta.main' },
  { name: 'radius', datatype: 'double', unit: 'arcsec', ucd: 'phys.angSize;pos' },
];

/** A table of names, ICRS positions and one radius, in a form that list searches of archives take. */
export async function sendPositions(
  response: Response,
  { format, radiusArcsec }: z.output<typeof positionsQuery>,
  positions: readonly { name: string; raDeg: number; decDeg: number }[],
): Promise<void> {
  const rows = positions.map(({ name, raDeg, decDeg }) => [name, raDeg, decDeg, radiusArcsec]);
  const isCsv = format === 'csv';
  const pieces = isCsv
    ? writeCsv(COLUMNS, rows)
    : writeVotable(COLUMNS, rows, { name: 'positions', description: 'Positions and search radii.', frame: 'ICRS' });
  const type = isCsv ? 'text/csv; charset=utf-8; header=present' : 'application/x-votable+xml; charset=utf-8';
  response.setHeader('Content-Type', type);
  response.setHeader('Content-Disposition', `attachment; filename="positions.${isCsv ? 'csv' : 'vot'}"`);
  await pipeline(Readable.from(pieces), response);
}
