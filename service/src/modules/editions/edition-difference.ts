import type { EditionDifference } from '@eremite/shared/contracts/edition';
import type { EditionHead } from '../../edition/edition-head.ts';
import { changedKeys } from '../runs/difference.ts';
import type { EditionLine } from './edition-contents.ts';

export interface EditionSide {
  id: string;
  head: EditionHead;
  lines: readonly EditionLine[];
}

const figure = (value: number | null): string => (value === null ? 'not known' : value.toFixed(3));

/** What one edition has that another has not. Sources are told by name: a new version of a list gives them new ids. */
export function differenceOfEditions(from: EditionSide, to: EditionSide): EditionDifference {
  const before = new Map(from.lines.map((line) => [line.item.name, line]));
  const after = new Set(to.lines.map((line) => line.item.name));
  const changed = to.lines.flatMap((line) => {
    const old = before.get(line.item.name);
    const what = old ? changes(old, line) : [];
    return what.length > 0 ? [{ name: line.item.name, what }] : [];
  });
  const place = ({ item, rank }: EditionLine) => ({ name: item.name, rank });
  const added = to.lines.filter((line) => !before.has(line.item.name));
  const hashes = (side: EditionSide) => new Map(side.head.inputs.map((input) => [input.contentHash, input.name]));
  const [old, now] = [hashes(from), hashes(to)];
  const { run, criteria } = to.head;
  return {
    from: { id: from.id, number: from.head.number },
    to: { id: to.id, number: to.head.number },
    runChanged: run.number === from.head.run.number ? null : { from: from.head.run.number, to: run.number },
    criteriaChanged: changedKeys(from.head.criteria.settings, criteria.settings),
    inputsChanged: [
      ...[...now].filter(([hash]) => !old.has(hash)).map(([, name]) => `new: ${name}`),
      ...[...old].filter(([hash]) => !now.has(hash)).map(([, name]) => `gone: ${name}`),
    ],
    added: added.map(place),
    removed: from.lines.filter((line) => !after.has(line.item.name)).map(place),
    changed,
    unchanged: to.lines.length - added.length - changed.length,
  };
}

function changes(from: EditionLine, to: EditionLine): string[] {
  const what: string[] = [];
  const say = (name: string, a: string | number, b: string | number) => {
    if (a !== b) what.push(`${name} ${a} → ${b}`);
  };
  const settled = ({ item }: EditionLine) =>
    item.settled ? `${item.settled.starlight}, ${item.settled.surroundings}` : 'not settled';
  say('rank', from.rank, to.rank);
  say('settled', settled(from), settled(to));
  say('starlight', from.item.starlight, to.item.starlight);
  say('surroundings', from.item.surroundings, to.item.surroundings);
  say('P(none)', figure(from.item.pNone), figure(to.item.pNone));
  say('P(no neighbour)', figure(from.item.pAlone), figure(to.item.pAlone));
  say('distance in Mpc', figure(from.item.distanceMpc), figure(to.item.distanceMpc));
  if (from.words.reason !== to.words.reason) what.push('the reason');
  if (from.words.nullResult !== to.words.nullResult) what.push('what a null result would prove');
  return what;
}
