/** What pasted element sets would mean for an organisation, before anything is saved. */
import { type ElementSet, elementSetDigest } from '@skyberth/orbit';
import type { ReadElement } from '@skyberth/shared';
import { sha256 } from '../platform/ids.js';
import { digestKey } from './elements.repository.js';
import type { SpacecraftRow } from './spacecraft.repository.js';

/** A set, the spacecraft it belongs to (null for one that is not known yet), and what saving would do. */
export interface ReadSet {
  readonly set: ElementSet;
  readonly digest: string;
  readonly spacecraft: SpacecraftRow | null;
  readonly fate: ReadElement['fate'];
}

export interface Known {
  readonly spacecraft: readonly SpacecraftRow[];
  readonly digests: ReadonlySet<string>;
  readonly newestMs: ReadonlyMap<string, number>;
}

/** Attaches each set to a spacecraft: by number, else by designator or name where no number contradicts. */
export function judge(sets: readonly ElementSet[], known: Known, attachTo: SpacecraftRow | null): ReadSet[] {
  const index = new SpacecraftIndex(known.spacecraft);
  const seen = new Set<string>();
  return sets.map((set) => {
    const spacecraft = attachTo ?? index.find(set);
    const digest = digestOf(set);
    const key = digestKey(spacecraft?.id ?? objectKey(set), digest);
    const repeated = seen.has(key) || known.digests.has(key);
    seen.add(key);
    return { set, digest, spacecraft, fate: fateOf(set, spacecraft, repeated, known.newestMs) };
  });
}

function fateOf(
  set: ElementSet,
  spacecraft: SpacecraftRow | null,
  repeated: boolean,
  newestMs: ReadonlyMap<string, number>,
): ReadElement['fate'] {
  if (repeated) return 'duplicate';
  if (!spacecraft) return 'new-spacecraft';
  return set.epochMs < (newestMs.get(spacecraft.id) ?? Number.NEGATIVE_INFINITY) ? 'older' : 'new';
}

/** SHA-256 of what moves the spacecraft: sets of one digest give the same passes. */
export const digestOf = (set: ElementSet): string => sha256(elementSetDigest(set));

/** Sets of one object share it, also before the spacecraft exists. */
export const objectKey = (set: ElementSet): string =>
  set.catalogNumber > 0 ? `#${set.catalogNumber}` : `${set.objectId}|${set.objectName.toLowerCase()}`;

class SpacecraftIndex {
  private readonly byNumber = new Map<number, SpacecraftRow>();
  private readonly byDesignator = new Map<string, SpacecraftRow>();
  private readonly byName = new Map<string, SpacecraftRow>();

  constructor(all: readonly SpacecraftRow[]) {
    for (const row of all) {
      if (row.catalogNumber !== null) this.byNumber.set(row.catalogNumber, row);
      else {
        if (row.internationalDesignator) this.byDesignator.set(row.internationalDesignator.toLowerCase(), row);
        this.byName.set(row.name.toLowerCase(), row);
      }
    }
  }

  find(set: ElementSet): SpacecraftRow | null {
    return (
      this.byNumber.get(set.catalogNumber) ??
      (set.objectId ? this.byDesignator.get(set.objectId.toLowerCase()) : undefined) ??
      (set.objectName ? this.byName.get(set.objectName.toLowerCase()) : undefined) ??
      null
    );
  }
}
