import { type Zippable, zipSync } from 'fflate';
import type { Result } from '../domain/result.ts';
import { carryOver } from './carry-over.ts';
import { extensionsXml, projectXml, versionXml } from './frame-xml.ts';
import { makeTopics } from './make-topics.ts';
import { markupXml, snapshotFile, viewFile } from './markup-xml.ts';
import type { BcfVersion, ReturnedBcf, Topic, TopicModel } from './types.ts';
import { viewXml } from './view-xml.ts';
import { isGlobalId, xmlDate } from './words.ts';

export interface BcfOptions {
  readonly version: BcfVersion;
  /** What came back of an earlier file: its statuses and comments are carried on. */
  readonly replies: ReturnedBcf | null;
  /** Clock time (xs:dateTime) for the dates; the model's own time stamp where it is null. */
  readonly stamp: string | null;
}

export const BCF_DEFAULTS: BcfOptions = { version: '3.0', replies: null, stamp: null };

/**
 * The findings of a result as topics: the bytes of a `.bcf` file, the same for the same result. With `replies`, topics keep
 * their status, assignee and comments, and those whose finding is gone are offered as closed.
 *
 * @example
 * writeFileSync('roof.bcf', writeBcf(result, { version: '2.1' }));
 */
export function writeBcf(result: Result, options: Partial<BcfOptions> = {}): Uint8Array {
  const { version, replies, stamp } = { ...BCF_DEFAULTS, ...options };
  const model = topicModel(result);
  const date = stamp ?? model.date;
  const made = makeTopics(result, date);
  return bcfOf(replies === null ? made : carryOver(made, result, replies, date), model, version);
}

/** What topics say of the model that they are about. */
export function topicModel({ model }: Result): TopicModel {
  const project = model.project?.globalId ?? '';
  return {
    fileName: model.file,
    date: xmlDate(model.written),
    project: isGlobalId(project) ? project : null,
    projectName: model.project?.name ?? null,
  };
}

/** The earliest time that a zip can say, in the machine's own zone as zips have it: no clock shows in the bytes. */
const NO_TIME = new Date(1980, 0, 1, 0, 0, 0);

/** The bytes of a file with these topics. */
export function bcfOf(topics: readonly Topic[], model: TopicModel, version: BcfVersion): Uint8Array {
  const encoder = new TextEncoder();
  const files: Zippable = { 'bcf.version': encoder.encode(versionXml(version)) };
  files['project.bcfp'] = encoder.encode(projectXml(model, version));
  if (version === '3.0') files['extensions.xml'] = encoder.encode(extensionsXml(topics));
  for (const topic of topics) {
    const inFolder = (name: string) => `${topic.guid}/${name}`;
    files[inFolder('markup.bcf')] = encoder.encode(markupXml(topic, model, version));
    for (const [index, view] of topic.views.entries()) {
      files[inFolder(viewFile(index))] = encoder.encode(viewXml(view, version));
      // Pictures are packed already.
      files[inFolder(snapshotFile(index))] = [view.snapshot, { level: 0 }];
    }
  }
  return zipSync(files, { mtime: NO_TIME, level: 6 });
}
