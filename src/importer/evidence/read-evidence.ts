import type { Sources } from '../read-element.ts';
import { readAssemblies } from './assemblies.ts';
import { readPlates } from './plates.ts';
import { readRelated } from './related.ts';
import type { Evidence } from './types.ts';

export type EvidenceSources = Pick<Sources, 'reading' | 'relations' | 'placements' | 'sections'>;

/** Nothing is read until it is asked for, and nothing twice. */
export function readEvidence(sources: EvidenceSources): Evidence {
  const { reading, relations } = sources;
  const related = once(() => readRelated(reading.file));
  const assemblies = once(() => readAssemblies(reading.file, relations));
  const plates = once(() => readPlates(sources, assemblies()));
  return {
    get related() {
      return related();
    },
    get plates() {
      return plates().plates;
    },
    get unreadPlates() {
      return plates().unread;
    },
    get assemblies() {
      return assemblies();
    },
  };
}

function once<T>(read: () => T): () => T {
  let known: { readonly value: T } | null = null;
  return () => {
    known ??= { value: read() };
    return known.value;
  };
}
