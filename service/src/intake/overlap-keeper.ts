import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { RowChunk } from '../tables/table.ts';
import type { ExtractedChunk } from './extract-roles.ts';
import { withoutDuplicates } from './merge-duplicates.ts';
import type { OpenCatalogue } from './open-catalogue.ts';
import { DEFAULT_OVERLAP_ARCSEC, PartOverlaps } from './part-overlaps.ts';

const REASON = 'An earlier part has the same object, which is kept';

/**
 * Takes out of a catalogue of several files what the files have in common. HI lists are left alone: their positions are
 * not good enough, and what is in them twice is found with the velocities.
 */
export class OverlapKeeper {
  private readonly parts: OpenCatalogue['parts'];
  private readonly overlaps: PartOverlaps | undefined;
  private readonly radius: number;
  private count = 0;

  constructor(
    { parts, resolution, isJoined }: Pick<OpenCatalogue, 'parts' | 'resolution' | 'isJoined'>,
    private readonly settings: IntakeSettings,
  ) {
    this.parts = parts;
    this.radius = settings.overlapArcsec ?? DEFAULT_OVERLAP_ARCSEC;
    const wanted = isJoined && resolution.resolved.kind !== 'hi' && this.radius > 0;
    this.overlaps = wanted ? new PartOverlaps(this.radius) : undefined;
  }

  /** The chunk without the rows that an earlier part has. It comes from the last of the parts begun. */
  without(extracted: ExtractedChunk, chunk: RowChunk): ExtractedChunk {
    const found = this.overlaps?.take(extracted.roles, this.parts.length - 1);
    if (!found || found.size === 0) return extracted;
    this.count += found.size;
    const rows = extracted.roles.columns['row'] as Uint32Array;
    const same = new Map([...found].map(([i, of]) => [rows[i]!, { of }]));
    return withoutDuplicates(extracted, chunk, same, REASON);
  }

  questions(): SettingsQuestion[] {
    if (this.count === 0) return [];
    const rows = this.count === 1 ? 'One row lies' : `${this.count.toLocaleString('en')} rows lie`;
    const text = `${rows} within ${this.radius} arcsec of a row of an earlier part and count as the same object: the earlier row is kept.`;
    const level = this.settings.overlapArcsec === undefined ? 'assumed' : 'warning';
    return [{ level, pointer: '/overlapArcsec', text }];
  }
}
