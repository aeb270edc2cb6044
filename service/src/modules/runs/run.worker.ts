import type { TaskAnswer } from '../../matching/task-pool.ts';
import { packCandidates, packNeighbours } from '../../scoring/evidence.ts';
import type { ScoredDetection, ScoredItem } from '../../scoring/scored-detection.ts';
import { type ScoringAsked, scoringDesk } from '../../scoring/scoring-task.ts';
import { selectionOf } from '../../scoring/row-selection.ts';
import { joinSifted, siftRows } from '../../scoring/sift-rows.ts';
import { unpackTable } from './packed-input.ts';
import type { ReadingAsked } from './read-run-tables.ts';
import type { StoredUnit, StoredVerdict, ThreadFailure } from './run-messages.ts';
import { failureOf } from './thread-failure.ts';

// A thread of the pool that does a run. Scoring keeps threads busy for seconds to minutes; here it does so without
// keeping requests waiting.
const desk = scoringDesk(store);

export default function answer(asked: ScoringAsked | ReadingAsked): TaskAnswer<unknown, ThreadFailure> {
  try {
    return { result: 'run' in asked ? desk(asked) : read(asked) };
  } catch (error) {
    return { refused: failureOf(error) };
  }
}

function read(asked: ReadingAsked): unknown {
  if ('unpack' in asked) return unpackTable(asked.unpack);
  if ('select' in asked) return selectionOf(asked.select);
  if ('join' in asked) return joinSifted(asked.join);
  const { kind, roles } = unpackTable(asked.sift, 'sky');
  return siftRows(kind, roles, asked.selection);
}

function store(scored: ScoredDetection[]): StoredUnit {
  const unit: StoredUnit = { verdicts: [], candidates: 0, neighbours: 0 };
  for (const one of scored) {
    unit.candidates += one.candidates.length;
    unit.neighbours += one.neighbours.length;
    unit.verdicts.push({
      position: one.position,
      catalogueId: one.catalogueId,
      row: one.row,
      facts: factsOf(one.item),
      item: JSON.stringify(one.item),
      detail: JSON.stringify(one.detail()),
      candidates: packCandidates(one.candidates, one.detection),
      neighbours: packNeighbours(one.neighbours, one.detection),
    });
  }
  return unit;
}

function factsOf(item: ScoredItem): StoredVerdict['facts'] {
  const { name, raDeg, decDeg, velocityKms, distanceMpc, logHiMass, starlight, surroundings } = item;
  const { pNone, pMissed, pSpurious, power, pAlone } = item;
  const place = { name, raDeg, decDeg, velocityKms, distanceMpc, logHiMass };
  return { ...place, starlight, pNone, pMissed, pSpurious, power, surroundings, pAlone };
}
