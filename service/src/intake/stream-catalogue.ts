import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Intake, IntakeCheck, SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { RowChunk } from '../tables/table.ts';
import { type CatalogueFacts, FactsGatherer } from './catalogue-facts.ts';
import { closingQuestions } from './closing-questions.ts';
import { statedFootprint } from './coverage.ts';
import { type ExtractedChunk, RoleExtractor } from './extract-roles.ts';
import type { OpenCatalogue } from './open-catalogue.ts';
import { DuplicateFinder, duplicateQuestions, duplicatesIn, withoutDuplicates } from './merge-duplicates.ts';
import { OverlapKeeper } from './overlap-keeper.ts';
import { SettingsError } from './resolved.ts';
import { SidelineTally } from './sideline-tally.ts';

/** What is known once every row has been through. */
export interface CatalogueSummary {
  check: IntakeCheck;
  facts: CatalogueFacts;
  /** Every question of the resolution and of the rows, in that order. */
  questions: SettingsQuestion[];
  /** Rows of an HI list that seem one source, merged or not. */
  duplicates: Intake['duplicates'];
}

/**
 * Passes every row of an opened catalogue through its settings, chunk by chunk, and sums up at the end.
 *
 * @param take is given each chunk with what became of it, and is waited for
 * @throws {SettingsError} where the settings do not fit the table, or no position is named
 */
export async function streamCatalogue(
  catalogue: OpenCatalogue,
  settings: IntakeSettings,
  take: (extracted: ExtractedChunk, chunk: RowChunk) => void | Promise<void>,
): Promise<CatalogueSummary> {
  const { resolution, table } = catalogue;
  assertReadable(catalogue);
  const extractor = new RoleExtractor(resolution.resolved, table.columns);
  const sidelined = new SidelineTally();
  const gatherer = new FactsGatherer();
  const isHi = resolution.resolved.kind === 'hi';
  const merging = isHi && settings.mergeDuplicates === true;
  const apart = new Set(settings.keepApart ?? []);
  const before = merging ? await duplicatesIn(catalogue.chunks(), resolution.resolved, table.columns) : undefined;
  const put = before?.duplicates.filter(({ row }) => !apart.has(row)) ?? [];
  const duplicates = new Map(put.map((duplicate) => [duplicate.row, duplicate]));
  const finder = new DuplicateFinder(resolution.resolved);
  const overlaps = new OverlapKeeper(catalogue, settings);
  let rows = 0;
  let leftOut = 0;
  for await (const chunk of catalogue.chunks()) {
    const extracted = overlaps.without(withoutDuplicates(extractor.extract(chunk), chunk, duplicates), chunk);
    rows += chunk.rows + (chunk.broken?.length ?? 0);
    leftOut += extracted.leftOut;
    for (const { row } of extracted.sidelined) sidelined.add(row);
    gatherer.add(extracted.roles);
    if (isHi && !merging) finder.add(extracted.roles);
    await take(extracted, chunk);
  }
  const closing = closingQuestions(settings, resolution.resolved, table, extractor, catalogue.broken());
  const found = before ?? finder.find();
  const keptApart = found.duplicates.length - put.length;
  const remarks = duplicateQuestions(found.duplicates, merging, keptApart);
  const questions = [...resolution.questions, ...closing, ...remarks, ...overlaps.questions()];
  const facts = gatherer.facts();
  const check: IntakeCheck = {
    rows,
    usable: facts.rows,
    sidelined: sidelined.count,
    leftOut,
    reasons: sidelined.summary(),
    questions,
    ready: facts.rows > 0 && questions.every(({ level }) => level !== 'ask'),
  };
  return { check, facts, questions, duplicates: { count: found.duplicates.length, pairs: found.pairs } };
}

/** Faults, and a position that is still asked for, make rows unreadable. @throws {SettingsError} */
export function assertReadable({ resolution }: OpenCatalogue): void {
  const { columns, footprint } = resolution.resolved;
  const faults = [...resolution.faults];
  try {
    statedFootprint(footprint);
  } catch (error) {
    if (!(error instanceof SettingsError)) throw error;
    faults.push(...error.faults);
  }
  if (columns.raHours === null && (columns.ra === null || columns.dec === null)) {
    for (const { pointer, text } of resolution.questions) {
      if (/^\/columns\/(ra|dec)$/.test(pointer) && !faults.some((fault) => fault.pointer === pointer)) {
        faults.push({ pointer, detail: text });
      }
    }
  }
  if (faults.length) throw new SettingsError(faults);
}
