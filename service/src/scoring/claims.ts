import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { jointClaimFactors } from '@eremite/shared/science/counterpart/joint-claims';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import { conclude, type StarlightAssessment } from './assess.ts';
import type { Detection } from './detection-table.ts';
import type { Detections } from './detections.ts';
import type { WeighedObject } from './weighed-object.ts';

/** Claims less probable than this, in either detection, are no conflict. Our choice. */
const WORTH_SOLVING = 0.01;
/** Detections of one conflict solved together; those further down a longer chain are taken by themselves. */
const MOST_TOGETHER = 12;
/** Velocities of one source in two lists agree to this, km/s, or half the line. Our choice. */
const SAME_SOURCE_KMS = 50;

interface Node {
  assessment: StarlightAssessment;
  /** Its claims by galaxy. */
  claims: Map<string, { object: WeighedObject; p: number }>;
}

/**
 * Solves jointly where one galaxy is claimed by several detections: no galaxy belongs to two of them.
 *
 * Every chain of detections that share claims is followed to its end, wherever its members lie in the input, so that
 * any split of a run into ranges gives the same answer.
 */
export class Claims {
  private grid: ZoneGrid | undefined;
  private searchArcsec = new Float64Array(0);
  private widestArcsec = 0;

  constructor(
    private readonly detections: Detections,
    private readonly criteria: CriteriaSettings,
    private readonly assess: (range: readonly Detection[]) => StarlightAssessment[],
  ) {}

  /**
   * @param assessed detections judged by themselves
   * @param positions their places in the input order
   * @returns the same, those in a conflict concluded anew
   */
  solve(assessed: readonly StarlightAssessment[], positions: readonly number[]): StarlightAssessment[] {
    const nodes = new Map<number, Node>();
    const links = new Map<number, { to: number; separationArcsec: number }[]>();
    const add = (assessment: StarlightAssessment, position: number) =>
      nodes.set(position, { assessment, claims: claimsOf(assessment) });
    assessed.forEach((assessment, i) => add(assessment, positions[i]!));
    let open = positions.filter((position) => nodes.get(position)!.claims.size > 0);
    while (open.length > 0) {
      this.link(
        open.map((position) => nodes.get(position)!.assessment.detection),
        open,
        links,
      );
      const wanted = [...new Set(open.flatMap((p) => links.get(p)!.map(({ to }) => to)))].filter((p) => !nodes.has(p));
      const more = wanted.length > 0 ? this.assess(this.detections.pick(wanted)) : [];
      more.forEach((assessment, i) => add(assessment, wanted[i]!));
      // Only those that share a claim carry the chain further.
      open = wanted.filter((to) =>
        [...links].some(
          ([from, all]) => all.some((link) => link.to === to) && shares(nodes.get(from)!, nodes.get(to)!),
        ),
      );
    }
    return assessed.map((assessment, i) => this.concluded(assessment, positions[i]!, nodes, links));
  }

  private concluded(
    assessment: StarlightAssessment,
    position: number,
    nodes: ReadonlyMap<number, Node>,
    links: ReadonlyMap<number, readonly { to: number; separationArcsec: number }[]>,
  ): StarlightAssessment {
    const rivals = (at: number) =>
      (links.get(at) ?? []).filter(({ to }) => nodes.has(to) && shares(nodes.get(at)!, nodes.get(to)!));
    if (rivals(position).length === 0) return assessment;
    // The chain through this detection, in input order.
    const chain = [position];
    for (let k = 0; k < chain.length && chain.length < MOST_TOGETHER; k++) {
      for (const { to } of rivals(chain[k]!)) if (!chain.includes(to) && chain.length < MOST_TOGETHER) chain.push(to);
    }
    chain.sort((a, b) => a - b);
    const members = chain.map((at) => nodes.get(at)!);
    const shared = members.map(({ claims }) =>
      [...claims].filter(([key]) => members.filter((other) => other.claims.has(key)).length > 1),
    );
    const factors = jointClaimFactors(
      shared.map((claims) => ({ claims: new Map(claims.map(([key, { p }]) => [key, p] as const)) })),
    );
    const joint = members.map((_, i) => jointly(shared[i]!, factors[i]!));
    const me = chain.indexOf(position);
    for (const [key, { object }] of shared[me]!) object.weight *= factors[me]!.get(key)!;
    const claims = shared[me]!.flatMap(([key, { object, p }]) =>
      rivals(position).flatMap(({ to, separationArcsec }) => {
        const there = joint[chain.indexOf(to)]?.get(key);
        if (there === undefined) return [];
        const by = nodes.get(to)!.assessment.detection;
        return [{ object, by, separationArcsec, alone: p, here: joint[me]!.get(key)!, there }];
      }),
    );
    return conclude({ ...assessment, claims }, this.criteria);
  }

  /** Finds the detections whose search circles overlap those of some. */
  private link(
    some: readonly Detection[],
    positions: readonly number[],
    links: Map<number, { to: number; separationArcsec: number }[]>,
  ): void {
    const grid = this.index();
    const found = pairSearch(grid, {
      raDeg: Float64Array.from(some, ({ raDeg }) => raDeg),
      decDeg: Float64Array.from(some, ({ decDeg }) => decDeg),
      radiusArcsec: Float64Array.from(some, ({ searchArcsec }) => searchArcsec + this.widestArcsec),
    });
    for (const position of positions) links.set(position, []);
    for (let k = 0; k < found.position.length; k++) {
      const i = found.position[k]!;
      const to = found.row[k]!;
      const separationArcsec = found.separationArcsec[k]!;
      if (to === positions[i] || separationArcsec > some[i]!.searchArcsec + this.searchArcsec[to]!) continue;
      if (isSameSource(some[i]!, this.detections.at(to), separationArcsec)) continue;
      links.get(positions[i]!)!.push({ to, separationArcsec });
    }
  }

  private index(): ZoneGrid {
    if (!this.grid) {
      const { raDeg, decDeg } = this.detections.places();
      this.grid = buildZoneGrid(raDeg, decDeg);
      this.searchArcsec = Float64Array.from(
        this.detections.range(0, this.detections.length),
        ({ searchArcsec }) => searchArcsec,
      );
      this.widestArcsec = this.searchArcsec.reduce((most, radius) => Math.max(most, radius), 0);
    }
    return this.grid;
  }
}

const keyOf = ({ head }: WeighedObject): string => `${head.catalogue.index}/${head.index}`;

function claimsOf({ objects, probabilities }: StarlightAssessment): Node['claims'] {
  return new Map(
    objects.flatMap((object, j) => {
      const p = probabilities.objects[j]!;
      return p >= WORTH_SOLVING ? [[keyOf(object), { object, p }] as const] : [];
    }),
  );
}

const shares = (a: Node, b: Node): boolean => [...a.claims.keys()].some((key) => b.claims.has(key));

/** The same source in another HI list: both may have the galaxy. */
function isSameSource(a: Detection, b: Detection, separationArcsec: number): boolean {
  if (a.catalogue === b.catalogue) return false;
  const near = separationArcsec <= Math.max(a.searchArcsec, b.searchArcsec);
  const widest = Math.max(a.width50Kms > 0 ? a.width50Kms : 0, b.width50Kms > 0 ? b.width50Kms : 0);
  return near && !(Math.abs(a.czKms - b.czKms) > Math.max(SAME_SOURCE_KMS, widest / 2));
}

/** Joint probabilities of shared galaxies from those alone and the factors of their weights. */
function jointly(
  claims: readonly (readonly [string, { p: number }])[],
  factors: ReadonlyMap<string, number>,
): Map<string, number> {
  const free = claims.reduce((rest, [, { p }]) => rest - p, 1);
  const weights = claims.map(([key, { p }]) => [key, p * factors.get(key)!] as const);
  const total = weights.reduce((sum, [, weight]) => sum + weight, Math.max(1e-12, free));
  return new Map(weights.map(([key, weight]) => [key, weight / total]));
}
