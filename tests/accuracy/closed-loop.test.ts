import { describe, expect, it } from 'vitest';
import { BROKEN, FAIR } from '../../testdata/closed-loop/assumptions.ts';
import { closeLoop, type ClosedLoop } from '../support/closed-loop.ts';

/**
 * Universes whose truth is known, scored by the engine: are its probabilities what they say?
 * Small by default; EREMITE_LONG draws enough for ten filled bins and prints how far each broken assumption moves them.
 */
const LONG = process.env['EREMITE_LONG'] !== undefined;
const SIZE = LONG ? { detections: 4000, sideDeg: 14.6 } : { detections: 1200, sideDeg: 8 };

interface Bin {
  count: number;
  stated: number;
  found: number;
}

/** Ten bins of a stated probability: how many, their mean, and the share for which it was true. */
function binned(stated: readonly number[], truth: readonly boolean[]): Bin[] {
  const bins = Array.from({ length: 10 }, () => ({ count: 0, stated: 0, found: 0 }));
  stated.forEach((p, i) => {
    const bin = bins[Math.min(9, Math.floor(10 * p))]!;
    bin.count++;
    bin.stated += p;
    if (truth[i]) bin.found++;
  });
  return bins.map(({ count, stated: sum, found }) => ({ count, stated: sum / count, found: found / count }));
}

/** Area under the curve: how often a true case is ranked over a false one. */
function areaUnderCurve(score: readonly number[], truth: readonly boolean[]): number {
  const order = score.map((value, i) => ({ value, is: truth[i]! })).sort((a, b) => a.value - b.value);
  let ranks = 0;
  let yes = 0;
  order.forEach(({ is }, i) => {
    if (!is) return;
    ranks += i + 1;
    yes++;
  });
  return (ranks - (yes * (yes + 1)) / 2) / (yes * (order.length - yes));
}

function judge({ universe, scored }: ClosedLoop) {
  const dark = scored.map(({ position }) => universe.detections[position]!.dark);
  const unseen = scored.map(({ position }) => !universe.detections[position]!.catalogued);
  const none = scored.map(({ item }) => item.pNone);
  const noneOrMissed = scored.map(({ item }) => item.pNone + item.pMissed);
  const called = scored.filter(({ item }) => item.starlight === 'dark');
  const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
  return {
    none: binned(none, dark),
    noneOrMissed: binned(noneOrMissed, unseen),
    area: areaUnderCurve(noneOrMissed, dark),
    expectedDark: sum(none),
    trulyDark: dark.filter(Boolean).length,
    variance: sum(none.map((p) => p * (1 - p))),
    called: called.length,
    calledTruly: called.filter(({ position }) => universe.detections[position]!.dark).length,
    calledUnseen: called.filter(({ position }) => !universe.detections[position]!.catalogued).length,
  };
}

const report = (
  name: string,
  { none, noneOrMissed, area, expectedDark, trulyDark, called, calledTruly }: ReturnType<typeof judge>,
) => {
  if (!LONG) return;
  const line = (bins: readonly Bin[]) =>
    bins
      .map(({ count, stated, found }) => (count ? `${stated.toFixed(2)}:${found.toFixed(2)}(${count})` : '-'))
      .join(' ');
  console.log(
    `${name}: P(none) stated:true(n) ${line(none)}; P(none)+P(missed) ${line(noneOrMissed)}; area ${area.toFixed(3)}; ` +
      `sum of P(none) ${expectedDark.toFixed(0)}, dark ${trulyDark}; called dark ${called}, truly ${calledTruly}`,
  );
};

/** A bin may miss the diagonal by three of its binomial errors, and by what finite learning costs. */
const allowed = ({ count, stated }: Bin): number =>
  3 * Math.sqrt(Math.max(stated * (1 - stated), 0.5 / count) / count) + 0.02;

describe('probabilities in a universe whose truth is known', { timeout: LONG ? 3_600_000 : 300_000 }, () => {
  it('are what they say where the assumptions hold', async () => {
    const judged = judge(await closeLoop({ ...FAIR, ...SIZE }));
    report('as assumed', judged);
    for (const bins of [judged.none, judged.noneOrMissed]) {
      for (const bin of bins) {
        if (bin.count >= 5) expect(Math.abs(bin.found - bin.stated), JSON.stringify(bin)).toBeLessThan(allowed(bin));
      }
    }
    // The number of dark ones to be expected is the sum of P(none).
    expect(Math.abs(judged.expectedDark - judged.trulyDark)).toBeLessThan(3 * Math.sqrt(judged.variance) + 2);
    expect(judged.area).toBeGreaterThan(0.9);
    expect(judged.calledUnseen).toBe(judged.called);
  });

  it('are far off, and the run says so, where positions err twice as much as stated', async () => {
    const loop = await closeLoop({ ...FAIR, ...SIZE, ...BROKEN['centroid errors twice as large'] });
    const judged = judge(loop);
    report('centroid errors twice as large', judged);
    expect(judged.expectedDark).toBeGreaterThan(2 * judged.trulyDark);
    expect(loop.notes.join()).toMatch(
      /secure counterparts is 1\.\d+ times what the position errors give: the errors are too small/,
    );
  });

  it.runIf(LONG).each(Object.keys(BROKEN))(
    'still rank dark over starlit with one assumption broken: %s',
    async (name) => {
      const judged = judge(await closeLoop({ ...FAIR, ...SIZE, ...BROKEN[name] }));
      report(name, judged);
      expect(judged.area).toBeGreaterThan(0.85);
    },
  );
});
