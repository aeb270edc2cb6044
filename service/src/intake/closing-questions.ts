import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { TableError, TableFacts } from '../tables/table.ts';
import type { RoleExtractor } from './extract-roles.ts';
import { nameParts } from './name-parts.ts';
import type { ResolvedSettings } from './resolved.ts';
import { conversionOf } from './units.ts';

/** What can be said only once every row has been seen. */
export function closingQuestions(
  settings: IntakeSettings,
  resolved: ResolvedSettings,
  table: TableFacts,
  extractor: RoleExtractor,
  broken: TableError | undefined,
): SettingsQuestion[] {
  const questions = extractor.questions();
  const column = resolved.columns.ra;
  const stated = settings.units?.['ra'];
  if (column !== null && stated === undefined && extractor.decimals.count > 0) {
    const unit = table.columns.find(({ name }) => name === column)?.unit ?? nameParts(column).unit;
    const inHours = unit !== undefined && conversionOf('angle', unit)?.factor === 15;
    if (inHours) {
      questions.push({
        level: 'ask',
        pointer: '/units/ra',
        text: `"${column}" is said to be in hours (${unit}): set the unit to "h" if that is so, or to "deg".`,
      });
    } else if (extractor.decimals.mayBeHours() && unit === undefined) {
      questions.push({
        level: 'ask',
        pointer: '/units/ra',
        text: `All right ascensions in "${column}" lie between 0 and 24 and no unit is stated: are they hours? Set the unit to "deg" or "h". Degrees are taken meanwhile.`,
      });
    }
  }
  if (broken) {
    // Rows may be missing that nobody knows of, so a person has to say that the rest is to be used.
    const text = breakOff(broken);
    questions.push(
      settings.acceptTruncated
        ? { level: 'assumed', pointer: '/acceptTruncated', text: `${text} That part is taken as accepted.` }
        : { level: 'ask', pointer: '/acceptTruncated', text: `${text} Or set acceptTruncated to take that part.` },
    );
  }
  return questions;
}

/** One sentence on a file that stops early: what, where, how much was kept, and the mend. */
function breakOff({ message, mend, line, byte, rowsRead }: TableError): string {
  const at = line !== undefined ? ` at line ${line}` : byte !== undefined ? ` at byte ${byte}` : '';
  const kept =
    rowsRead === undefined
      ? 'The rows before it are kept.'
      : `The ${rowsRead.toLocaleString('en')} rows before it are kept.`;
  return `The file could be read only in part${at}: ${message} ${kept} ${mend}`;
}
