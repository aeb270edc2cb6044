import type { StripLayout } from './strip-layout.ts';

/** What the strip shows, in words: for those who cannot see it. */
export function stripSummary({ placed, zones }: StripLayout): string {
  const count = (test: (one: StripLayout['placed'][number]) => boolean) => placed.filter(test).length;
  const moving = placed.filter(({ mark }) => mark.velocityDifferenceKms !== null);
  const within = (kpc: number, kms: number) =>
    moving.filter((one) => one.kpc <= kpc && Math.abs(one.mark.velocityDifferenceKms!) <= kms).length;
  const nearest = moving
    .filter(({ mark, where }) => where === 'inside' && mark.role === 'neighbour')
    .sort((a, b) => a.kpc - b.kpc)[0];
  const objects = (n: number) => (n === 1 ? '1 object' : `${n} objects`);
  const beyond = count(({ where }) => where === 'above' || where === 'below');
  return [
    `With a velocity: ${objects(within(zones.debrisKpc, zones.debrisKms))} in the debris zone`,
    `${within(zones.neighbourKpc, zones.neighbourKms)} in the neighbour zone`,
    `${beyond} beyond the velocities shown`,
    `without one: ${count(({ where }) => where === 'shelf')}`,
    nearest
      ? `the nearest neighbour is ${nearest.mark.name} at ${nearest.kpc.toFixed(0)} kpc`
      : 'no neighbour is shown',
  ].join(', ');
}
