import type { Result } from '../domain/result.ts';
import { NAMESPACE, uuidText, uuidVersion5 } from '../domain/uuid.ts';
import { matchReplies } from './match-replies.ts';
import type { ReturnedBcf, ReturnedTopic, Topic, TopicComment } from './types.ts';
import { AUTHOR, CLOSED, isClosed, OPEN, PRIORITIES, TYPES } from './words.ts';

/**
 * The topics of this run with what people said of them before. A topic that was closed though its fault stands is open again,
 * with a comment that says so; one whose finding is gone is offered as closed.
 */
export function carryOver(made: readonly Topic[], result: Result, { topics }: ReturnedBcf, date: string): Topic[] {
  const { matched, gone } = matchReplies(result, topics);
  const before = new Map(matched.map(({ group, topic }) => [group.guid, topic]));
  return [
    ...made.map((topic) => {
      const returned = before.get(topic.guid);
      return returned === undefined ? topic : continued(topic, returned, result, date);
    }),
    ...gone.map((topic) => settled(topic, result, date)),
  ];
}

/** Under the id that it is known by. */
function continued(topic: Topic, returned: ReturnedTopic, result: Result, date: string): Topic {
  const stands = isClosed(returned.status);
  const comments = stands
    ? withComment(returned.comments, returned.guid, `The finding still stands in ${result.model.file}.`, result, date)
    : returned.comments;
  return {
    ...topic,
    guid: returned.guid,
    created: returned.created,
    modified: date,
    status: stands || returned.status === '' ? OPEN : returned.status,
    priority: returned.priority === '' ? topic.priority : returned.priority,
    assignedTo: returned.assignedTo,
    labels: [...new Set([...topic.labels, ...returned.labels])],
    comments,
  };
}

function settled(topic: ReturnedTopic, result: Result, date: string): Topic {
  const words = `The finding is gone in ${result.model.file}.`;
  const wasClosed = isClosed(topic.status);
  return {
    guid: topic.guid,
    title: topic.title,
    type: topic.type === '' ? TYPES.note : topic.type,
    status: wasClosed ? topic.status : CLOSED,
    priority: topic.priority === '' ? PRIORITIES.note : topic.priority,
    labels: topic.labels,
    created: topic.created,
    author: topic.author === '' ? AUTHOR : topic.author,
    modified: wasClosed ? null : date,
    assignedTo: topic.assignedTo,
    description: topic.description,
    comments: wasClosed ? topic.comments : withComment(topic.comments, topic.guid, words, result, date),
    views: [],
  };
}

/** A comment of ours, once a model: the same words about the same bytes have the same id. */
function withComment(
  comments: readonly TopicComment[],
  topic: string,
  text: string,
  { model }: Result,
  date: string,
): TopicComment[] {
  const guid = uuidText(uuidVersion5(NAMESPACE, ['comment', topic, model.sha256, text].join('\n')));
  const others = comments.filter((comment) => comment.guid !== guid);
  return [...others, { guid, date, author: AUTHOR, text }];
}
