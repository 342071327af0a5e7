import { NAMESPACE, uuidText, uuidVersion5 } from '../domain/uuid.ts';
import type { BcfVersion, Topic, TopicModel } from './types.ts';
import { AUTHOR, CLOSED, OPEN, PRIORITIES, TYPES } from './words.ts';
import { type XmlNode, xmlDocument, xmlText, xmlTextOrNone } from './xml.ts';

/** What stands in the file beside the topics. */

export function versionXml(version: BcfVersion): string {
  return xmlDocument({ Version: { '@VersionId': version } });
}

export function projectXml({ project, projectName, fileName }: TopicModel, version: BcfVersion): string {
  const about = {
    '@ProjectId': uuidText(uuidVersion5(NAMESPACE, `project\n${project ?? fileName}`)),
    Name: xmlTextOrNone(projectName),
  };
  if (version === '3.0') return xmlDocument({ ProjectInfo: { Project: about } });
  return xmlDocument({ ProjectExtension: { Project: about, ExtensionSchema: '' } });
}

/** Declares every value that the topics use, beside those that a reply may want. */
export function extensionsXml(topics: readonly Topic[]): string {
  const distinct = (values: readonly (string | null)[]): string[] =>
    [...new Set(values.map((value) => xmlText(value ?? '')))].filter((value) => value !== '').sort();
  const list = (name: string, item: string, values: readonly (string | null)[]): XmlNode => ({
    [name]: { [item]: distinct(values) },
  });
  const people = topics.flatMap(({ author, assignedTo, comments }) => [
    author,
    assignedTo,
    ...comments.map((one) => one.author),
  ]);
  return xmlDocument({
    Extensions: {
      ...list('TopicTypes', 'TopicType', [...Object.values(TYPES), ...topics.map(({ type }) => type)]),
      ...list('TopicStatuses', 'TopicStatus', [OPEN, CLOSED, ...topics.map(({ status }) => status)]),
      ...list('Priorities', 'Priority', [...Object.values(PRIORITIES), ...topics.map(({ priority }) => priority)]),
      ...list(
        'TopicLabels',
        'TopicLabel',
        topics.flatMap(({ labels }) => labels),
      ),
      ...list('Users', 'User', [AUTHOR, ...people]),
    },
  });
}
