import type { BcfVersion, Topic, TopicComment, TopicModel } from './types.ts';
import { type XmlNode, xmlDocument, xmlText, xmlTextOrNone } from './xml.ts';

/** Names of a topic's files: the first view has the names that older readers look for. */
export const viewFile = (index: number): string => (index === 0 ? 'viewpoint.bcfv' : `viewpoint-${index + 1}.bcfv`);
export const snapshotFile = (index: number): string => (index === 0 ? 'snapshot.png' : `snapshot-${index + 1}.png`);

/** The `markup.bcf` of a topic; its elements stand in the order of the format's schemas. */
export function markupXml(topic: Topic, model: TopicModel, version: BcfVersion): string {
  const file = {
    '@IfcProject': model.project ?? undefined,
    [version === '3.0' ? '@IsExternal' : '@isExternal']: 'true',
    Filename: xmlTextOrNone(model.fileName),
    Date: model.date,
  };
  const header = version === '3.0' ? { Files: { File: [file] } } : { File: [file] };
  const views = topic.views.map(({ guid }, index) => ({
    '@Guid': guid,
    Viewpoint: viewFile(index),
    Snapshot: snapshotFile(index),
    Index: index,
  }));
  const comments = topic.comments.map(commentXml);
  if (version === '3.0') {
    const inside = {
      ...(comments.length > 0 ? { Comments: { Comment: comments } } : {}),
      ...(views.length > 0 ? { Viewpoints: { ViewPoint: views } } : {}),
    };
    return xmlDocument({ Markup: { Header: header, Topic: { ...topicXml(topic, version), ...inside } } });
  }
  return xmlDocument({
    Markup: {
      Header: header,
      Topic: topicXml(topic, version),
      ...(comments.length > 0 ? { Comment: comments } : {}),
      ...(views.length > 0 ? { Viewpoints: views } : {}),
    },
  });
}

function topicXml(topic: Topic, version: BcfVersion): XmlNode {
  const labels = topic.labels.map(xmlText).filter((label) => label !== '');
  return {
    '@Guid': topic.guid,
    '@TopicType': xmlText(topic.type),
    '@TopicStatus': xmlText(topic.status),
    Title: xmlTextOrNone(topic.title) ?? 'Untitled',
    Priority: xmlTextOrNone(topic.priority),
    Labels: labels.length === 0 ? undefined : version === '3.0' ? { Label: labels } : labels,
    CreationDate: topic.created,
    CreationAuthor: xmlTextOrNone(topic.author) ?? 'unknown',
    ModifiedDate: topic.modified ?? undefined,
    ModifiedAuthor: topic.modified === null ? undefined : xmlText(topic.author),
    AssignedTo: xmlTextOrNone(topic.assignedTo),
    Description: xmlTextOrNone(topic.description),
  };
}

function commentXml({ guid, date, author, text }: TopicComment): XmlNode {
  return {
    '@Guid': guid,
    Date: date,
    Author: xmlTextOrNone(author) ?? 'unknown',
    Comment: xmlTextOrNone(text) ?? '\u2013',
  };
}
