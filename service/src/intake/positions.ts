import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { type SkyFrame, toIcrs } from '@eremite/shared/science/sky/frames';
import { parseDeclination, parseRightAscension, type ParsedAngle } from '@eremite/shared/science/sky/sexagesimal';
import { joinDeclination, joinRightAscension } from '@eremite/shared/science/sky/sexagesimal-columns';
import type { RowChunk } from '../tables/table.ts';
import type { CellTally } from './cell-tally.ts';
import { lineOf, type MissingMarks, rowOf } from './number-cells.ts';
import { plainSexagesimal } from './plain-sexagesimal.ts';
import { cellAt } from './sample.ts';

export interface AxisRecipe {
  index: number;
  column: string;
  /** Degrees in the unit of plain numbers; sexagesimal text needs none. */
  factor: number;
}
export interface SplitRecipe {
  raHours: AxisRecipe;
  raMinutes: AxisRecipe;
  raSeconds?: AxisRecipe;
  decSign?: AxisRecipe;
  decDegrees: AxisRecipe;
  decMinutes: AxisRecipe;
  decSeconds?: AxisRecipe;
}
export type PositionRecipe =
  | { form: 'axes'; ra: AxisRecipe; dec: AxisRecipe; frame: SkyFrame }
  | { form: 'split'; parts: SplitRecipe; frame: SkyFrame };

/** Why a row has no usable position. */
export interface PositionFault {
  column: string;
  value: string;
  reason: string;
}
export interface ChunkPositions {
  /** ICRS degrees; NaN where there is a fault. */
  raDeg: Float64Array;
  decDeg: Float64Array;
  faults: Map<number, PositionFault>;
}

/** What the plain decimal right ascensions of a whole table look like, to notice hours given for degrees. */
export class DecimalRightAscensions {
  count = 0;
  max = -Infinity;
  min = Infinity;
  negative = 0;

  add(value: number): void {
    this.count++;
    if (value > this.max) this.max = value;
    if (value < this.min) this.min = value;
    if (value < 0) this.negative++;
  }

  /** As `mayBeHours`: more than twenty values, all within 0 to 24. */
  mayBeHours(): boolean {
    return this.count > 20 && this.max <= 24 && this.min >= 0;
  }
}

const MISSING = (axis: string) => `There is no ${axis} in this row; a row without a position cannot be used`;
const RA_RANGE = 'Right ascension must lie in 0 to 360 degrees (or -180 to 180); correct it, or set the unit';
const DEC_RANGE = 'Declination must lie in -90 to +90 degrees; correct it, or check that the columns are not exchanged';

/** Positions of the rows of a chunk in ICRS degrees; the frame is converted, sexagesimal text and split columns read. */
export function chunkPositions(
  chunk: RowChunk,
  recipe: PositionRecipe,
  marks: MissingMarks,
  decimals: DecimalRightAscensions,
  tally: CellTally,
): ChunkPositions {
  const found: ChunkPositions = {
    raDeg: new Float64Array(chunk.rows),
    decDeg: new Float64Array(chunk.rows),
    faults: new Map(),
  };
  if (recipe.form === 'split') readSplit(chunk, recipe.parts, found);
  else {
    readAxis(chunk, recipe.ra, 'right ascension', marks, found.raDeg, found.faults, tally, decimals);
    readAxis(chunk, recipe.dec, 'declination', marks, found.decDeg, found.faults, tally);
  }
  for (const i of found.faults.keys()) found.raDeg[i] = found.decDeg[i] = NaN;
  if (recipe.frame !== 'icrs') toIcrsInPlace(recipe.frame, found);
  return found;
}

function readAxis(
  chunk: RowChunk,
  axis: AxisRecipe,
  says: 'right ascension' | 'declination',
  marks: MissingMarks,
  out: Float64Array,
  faults: Map<number, PositionFault>,
  tally: CellTally,
  decimals?: DecimalRightAscensions,
): void {
  const data = chunk.columns[axis.index]!;
  const isRa = says === 'right ascension';
  const [low, high] = isRa ? [-180, 360] : [-90, 90];
  const least = isRa ? 0 : low;
  const fault = (i: number, value: string, reason: string) => {
    out[i] = NaN;
    if (!faults.has(i)) faults.set(i, { column: axis.column, value, reason });
  };
  const decimal = (i: number, given: number) => {
    const value = given * axis.factor;
    decimals?.add(given);
    if (value >= low && value <= high)
      out[i] = isRa ? (value < 0 ? (value + 360) % 360 : value === 360 ? 0 : value) : value;
    else fault(i, String(given), isRa ? RA_RANGE : DEC_RANGE);
  };
  const text = (i: number, cell: string) => {
    const plain = cell.trim();
    if (marks.holdsText(plain)) return fault(i, plain, MISSING(says));
    const value = Number(plain);
    if (plain !== '' && Number.isFinite(value)) {
      return marks.numbers.includes(value) ? fault(i, plain, MISSING(says)) : decimal(i, value);
    }
    const parsed = parse(plain, isRa ? parseRightAscension : parseDeclination);
    if (typeof parsed === 'string') return fault(i, plain, parsed);
    out[i] = parsed.deg;
    for (const warning of parsed.warnings)
      tally.refuse(axis.column, general(warning, plain), rowOf(chunk, i), lineOf(chunk, i), plain);
  };
  if (data.kind === 'text') {
    const { bytes, offsets } = data;
    const isMark = [...marks.texts].some((mark) => /\d[: ]\d/.test(mark));
    for (let i = 0; i < chunk.rows; i++) {
      const value = isMark ? NaN : plainSexagesimal(bytes, offsets[i]!, offsets[i + 1]!);
      if (isRa && value >= 0 && value < 24 && !Object.is(value, -0)) out[i] = value * 15;
      else if (!isRa && value >= -90 && value <= 90) out[i] = value;
      else text(i, cellAt(data, i));
    }
    return;
  }
  for (let i = 0; i < chunk.rows; i++) {
    const value = data.values[i]!;
    const inside = value * axis.factor;
    if (inside >= least && inside < high && marks.numbers.length === 0) {
      decimals?.add(value);
      out[i] = inside;
    } else if (!Number.isNaN(value)) {
      if (marks.numbers.includes(value)) fault(i, String(value), MISSING(says));
      else decimal(i, value);
    } else text(i, data.odd?.get(i) ?? '');
  }
}

function parse(text: string, reader: (text: string) => ParsedAngle): ParsedAngle | string {
  try {
    return reader(text);
  } catch (error) {
    if (error instanceof DomainError) return general(error.message, text);
    throw error;
  }
}

/** A message about one cell made to hold for all cells with the same fault, so that they are counted together. */
function general(message: string, text: string): string {
  const rest = message.startsWith(`"${text}"`) ? message.slice(text.length + 2).replace(/^:?\s*/, '') : message;
  return `${rest.charAt(0).toUpperCase()}${rest.slice(1)}`.replace(/, found -?[\d.e+]+$/, '');
}

function readSplit(chunk: RowChunk, parts: SplitRecipe, found: ChunkPositions): void {
  const cell = (axis: AxisRecipe | undefined, i: number) => (axis ? cellAt(chunk.columns[axis.index]!, i).trim() : '');
  const amount = (axis: AxisRecipe | undefined, i: number) => (axis ? Number(cell(axis, i) || NaN) : 0);
  for (let i = 0; i < chunk.rows; i++) {
    const degrees = cell(parts.decDegrees, i).replace('\u2212', '-');
    // Without a column of its own the sign is the character before the degrees: "-00" has it, the number -0 may not.
    const sign = parts.decSign ? cell(parts.decSign, i) : /^-/.test(degrees) ? '-' : '+';
    const at = (axis: AxisRecipe, reason: string) => {
      const value = [parts.raHours, parts.raMinutes, parts.decDegrees, parts.decMinutes]
        .map((p) => cell(p, i))
        .join(' ');
      found.faults.set(i, { column: axis.column, value, reason });
    };
    try {
      if (cell(parts.raHours, i) === '') at(parts.raHours, MISSING('right ascension'));
      else if (degrees === '') at(parts.decDegrees, MISSING('declination'));
      else {
        found.raDeg[i] = joinRightAscension(
          amount(parts.raHours, i),
          amount(parts.raMinutes, i),
          amount(parts.raSeconds, i),
        );
        found.decDeg[i] = joinDeclination(
          sign,
          Math.abs(Number(degrees)),
          amount(parts.decMinutes, i),
          amount(parts.decSeconds, i),
        );
      }
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      at(error.message.startsWith('decl') ? parts.decDegrees : parts.raHours, general(error.message, ''));
    }
  }
}

function toIcrsInPlace(frame: SkyFrame, { raDeg, decDeg }: ChunkPositions): void {
  for (let i = 0; i < raDeg.length; i++) {
    if (Number.isNaN(raDeg[i]!)) continue;
    const { lon, lat } = toIcrs(frame, raDeg[i]! * DEGREE, decDeg[i]! * DEGREE);
    raDeg[i] = (lon / DEGREE) % 360;
    decDeg[i] = lat / DEGREE;
  }
}
