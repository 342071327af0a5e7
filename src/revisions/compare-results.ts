import { CAUTION } from '../domain/caution.ts';
import { GENERATOR } from '../domain/generator.ts';
import type { Result } from '../domain/result.ts';
import { changedMembers } from './changes.ts';
import type { Comparison } from './comparison.ts';
import { findingChanges } from './finding-changes.ts';
import { forceChanges } from './force-changes.ts';
import { matchMembers } from './match-members.ts';
import { loadChanges, supportChanges } from './support-changes.ts';

/** What changed from one revision's result to the next, in the model and in the forces. */
export function compareResults(old: Result, now: Result): Comparison {
  const matching = matchMembers(old.members, now.members);
  return {
    format: 'pinwright-comparison',
    version: 1,
    generator: GENERATOR,
    caution: CAUTION,
    old: revision(old),
    new: revision(now),
    matched: matching.pairs.map((pair) => ({
      old: old.members[pair.old].globalId,
      new: now.members[pair.now].globalId,
      by: pair.by,
    })),
    added: matching.added.map((index) => now.members[index].globalId),
    removed: matching.removed.map((index) => old.members[index].globalId),
    changed: changedMembers(old, now, matching),
    supports: supportChanges(old, now),
    loads: loadChanges(old, now),
    forces: forceChanges(old, now, matching),
    findings: findingChanges(old, now, matching),
  };
}

const revision = ({ model, members, bars, stability }: Result): Comparison['old'] => ({
  file: model.file,
  sha256: model.sha256,
  members: members.length,
  bars: bars.length,
  mechanisms: stability.mechanisms,
});
