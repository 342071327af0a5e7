import { XMLParser } from 'fast-xml-parser';
import { strFromU8, unzipSync } from 'fflate';
import type { Result } from '../../src/domain/result.ts';
import { someResult } from '../exporter/support.ts';

/** GlobalIds that the format's schemas take. */
export const IDS = [
  '0aaaaaaaaaaaaaaaaaaaaa',
  '1bbbbbbbbbbbbbbbbbbbbb',
  '2ccccccccccccccccccccc',
  '3ddddddddddddddddddddd',
] as const;

/** A result with a near miss of the first two members, a lone third one and a remark without a place. */
export function faultyResult(): Result {
  const base = someResult([...IDS]);
  const finding = { nodes: [], place: null, gap: null, at: null, advice: 'Mend it.' };
  return {
    ...base,
    model: {
      ...base.model,
      project: { globalId: '0pppppppppppppppppppppp'.slice(0, 22), name: 'Quay' },
      written: '2024-03-05T10:11:12',
    },
    findings: [
      {
        ...finding,
        code: 'near-miss',
        severity: 'error',
        message: 'An end of D1 misses C1 by 32 mm & joins <nothing>.',
        members: [IDS[0], IDS[1]],
        at: [6, 0, 0],
        place: 'C/4, +6.20',
        gap: 0.032,
      },
      {
        ...finding,
        code: 'lone-member',
        severity: 'error',
        message: 'S-1 joins nothing.',
        members: [IDS[2]],
        at: [0, 2, 0],
        place: 'D/4, +0.00',
      },
      { ...finding, code: 'out-of-scope', severity: 'note', message: '3 railings are left out.', members: [] },
    ],
  };
}

/** The files in a BCF, as text where they are XML. */
export function filesOf(bytes: Uint8Array): Map<string, string> {
  return new Map(
    Object.entries(unzipSync(bytes)).map(([name, content]) => [name, name.endsWith('.png') ? '' : strFromU8(content)]),
  );
}

interface Markup {
  readonly Markup: { readonly Topic: Record<string, unknown> } & Record<string, unknown>;
}

/** The markups by topic, as an XML parser that is not ours reads them. */
export function markupsOf(bytes: Uint8Array): Map<string, Markup['Markup']> {
  const parser = new XMLParser({ ignoreAttributes: false, attributeNamePrefix: '@', parseTagValue: false });
  return new Map(
    [...filesOf(bytes)]
      .filter(([name]) => name.endsWith('/markup.bcf'))
      .map(([name, text]) => [name.split('/')[0]!, (parser.parse(text) as Markup).Markup]),
  );
}
