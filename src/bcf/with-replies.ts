import type { Result } from '../domain/result.ts';
import { matchReplies } from './match-replies.ts';
import type { ReturnedBcf, ReturnedTopic } from './types.ts';
import { isClosed } from './words.ts';

type Reply = NonNullable<Result['findings'][number]['reply']>;

/** The result with what came back beside its findings; `file` is the name of the returned file. */
export function withReplies(result: Result, returned: ReturnedBcf, file: string): Result {
  const { matched, gone, others } = matchReplies(result, returned.topics);
  const replies = new Map(
    matched.flatMap(({ group, topic, by }) => group.findings.map((finding) => [finding, replyOf(topic, by)] as const)),
  );
  return {
    ...result,
    findings: result.findings.map((finding) => {
      const reply = replies.get(finding);
      return reply === undefined ? finding : { ...finding, reply };
    }),
    replies: {
      file,
      topics: returned.topics.length,
      unreadable: returned.unreadable,
      matched: matched.length,
      others: others.length,
      gone: gone.map(({ guid, title, status }) => ({ topic: guid, title, status, closed: isClosed(status) })),
    },
  };
}

function replyOf(topic: ReturnedTopic, by: Reply['by']): Reply {
  return {
    topic: topic.guid,
    by,
    status: topic.status,
    closed: isClosed(topic.status),
    assignedTo: topic.assignedTo,
    comments: topic.comments.map(({ date, author, text }) => ({ date, author, text })),
  };
}
