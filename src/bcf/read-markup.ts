import type { XmlElement } from '../importer/files/ifcxml/xml-element.ts';
import type { ReturnedTopic, TopicComment } from './types.ts';
import { isGlobalId, xmlDate } from './words.ts';

/**
 * A topic of any version: they differ in where comments and labels stand. Null where it has no id. Missing parts are empty.
 * `views` are the roots of its viewpoint files, `folder` the name of its folder, which is its id where the markup says none.
 */
export function readMarkup(root: XmlElement, views: readonly XmlElement[], folder: string): ReturnedTopic | null {
  const topic = child(root, 'Topic');
  const guid = guidOf(topic === null ? null : attribute(topic, 'Guid')) ?? guidOf(folder);
  if (topic === null || guid === null) return null;
  const labels = all(topic, 'Labels').flatMap((label) => {
    const inside = all(label, 'Label');
    return inside.length > 0 ? inside.map(textOf) : [textOf(label)];
  });
  const comments = [...all(root, 'Comment'), ...all(topic, 'Comments').flatMap((list) => all(list, 'Comment'))];
  const header = child(root, 'Header');
  const files =
    header === null ? [] : [...all(header, 'File'), ...all(header, 'Files').flatMap((list) => all(list, 'File'))];
  return {
    guid,
    title: told(topic, 'Title'),
    type: attribute(topic, 'TopicType') ?? '',
    status: attribute(topic, 'TopicStatus') ?? lastStatus(comments),
    priority: told(topic, 'Priority'),
    labels: labels.filter((label) => label !== ''),
    created: xmlDate(told(topic, 'CreationDate')),
    author: told(topic, 'CreationAuthor'),
    assignedTo: told(topic, 'AssignedTo') || null,
    description: told(topic, 'Description'),
    comments: comments.flatMap(readComment),
    components: [...new Set(views.flatMap((view) => componentsOf(view)))].filter(isGlobalId),
    projects: files.flatMap((file) => attribute(file, 'IfcProject') ?? []),
  };
}

function readComment(comment: XmlElement, index: number): TopicComment[] {
  const text = told(comment, 'Comment');
  if (text === '') return [];
  const guid = guidOf(attribute(comment, 'Guid')) ?? `00000000-0000-4000-8000-${index.toString(16).padStart(12, '0')}`;
  return [{ guid, date: xmlDate(told(comment, 'Date')), author: told(comment, 'Author'), text }];
}

/** The oldest versions keep the status in the comments. */
function lastStatus(comments: readonly XmlElement[]): string {
  return comments.map((comment) => told(comment, 'Status')).findLast((status) => status !== '') ?? '';
}

function componentsOf(element: XmlElement): string[] {
  return element.children().flatMap((inside): string[] => {
    if (inside.name === 'Visibility') return [];
    const own = inside.name === 'Component' ? attribute(inside, 'IfcGuid') : null;
    return own === null ? componentsOf(inside) : [own];
  });
}

const GUID = /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

function guidOf(text: string | null): string | null {
  const guid =
    text
      ?.trim()
      .replace(/^\{|\}$/g, '')
      .toLowerCase() ?? '';
  return GUID.test(guid) ? guid : null;
}

function attribute(element: XmlElement, name: string): string | null {
  return element.data.find(([key]) => key.toLowerCase() === name.toLowerCase())?.[1].trim() || null;
}

const all = (element: XmlElement, name: string): XmlElement[] => element.children().filter((one) => one.name === name);
const child = (element: XmlElement, name: string): XmlElement | null => all(element, name)[0] ?? null;
const textOf = (element: XmlElement): string => element.text().trim();

/** The text of the first child of a name; '' where there is none. */
function told(element: XmlElement, name: string): string {
  const found = child(element, name);
  return found === null ? '' : textOf(found);
}
