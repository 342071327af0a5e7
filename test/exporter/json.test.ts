import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { resultSchema } from '../../src/domain/result.ts';
import { joinChunks } from '../../src/exporter/chunks.ts';
import { jsonPieces, resultJsonSchema, resultToJson } from '../../src/exporter/json.ts';
import { someResult } from './support.ts';

const written = (value: unknown) => [...jsonPieces(value)].join('');

describe('the result as JSON', () => {
  const result = someResult(['a'.repeat(22), 'b'.repeat(22)]);
  const text = new TextDecoder().decode(joinChunks(resultToJson(result)));

  it('reads back as the same result', () => {
    expect(resultSchema.parse(JSON.parse(text))).toEqual(result);
  });

  it('has every array of numbers on one line, however long', () => {
    const long = written({ force: Array.from({ length: 500 }, (_, k) => (k === 7 ? null : k / 3)) });
    expect(long.split('\n')).toHaveLength(4);
    expect(JSON.parse(long).force).toHaveLength(500);
  });

  it('keeps short objects on a line and breaks long ones', () => {
    expect(written([{ node: 'n1', force: [0, 0, -1] }])).toBe('[{"node": "n1", "force": [0, 0, -1]}]\n');
    for (const line of text.split('\n')) expect(line.length).toBeLessThan(700);
    expect(text.split('\n').length).toBeGreaterThan(100);
  });

  it('leaves out what is undefined', () => {
    expect(written({ a: undefined, b: 1 })).toBe('{"b": 1}\n');
    expect(written({ a: undefined, b: 'x'.repeat(200) })).toBe(`{\n  "b": "${'x'.repeat(200)}"\n}\n`);
  });

  it('says the same as JSON.stringify for any value', () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 6 }), (value) => {
        expect(JSON.parse(written(value))).toEqual(JSON.parse(JSON.stringify(value)));
      }),
    );
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])('refuses %d instead of writing null', (number) => {
    expect(() => written({ deep: [{ force: number }] })).toThrow(/cannot stand in a result/);
    expect(() => written([...Array(200).keys(), number])).toThrow(/cannot stand in a result/);
  });

  it('comes in pieces, so that no string holds all of it', () => {
    const many = { force: Array.from({ length: 200_000 }, (_, k) => k + 0.5) };
    let longest = 0;
    for (const piece of jsonPieces(many)) longest = Math.max(longest, piece.length);
    expect(longest).toBeLessThan(10_000);
  });
});

describe('the JSON Schema of the result', () => {
  it('names every key of the result', () => {
    const schema = resultJsonSchema() as { properties: Record<string, unknown>; required: string[] };
    const keys = Object.keys(someResult(['a']));
    expect(Object.keys(schema.properties)).toEqual(expect.arrayContaining(keys));
    expect(keys).toEqual(expect.arrayContaining(schema.required));
    expect(schema.required).toContain('envelope');
  });
});
