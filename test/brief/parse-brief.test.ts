import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { DEFAULT_BRIEF } from '../../src/brief/default-brief.ts';
import { LARGEST_BRIEF, parseBrief } from '../../src/brief/parse-brief.ts';
import { briefInputSchema } from '../../src/brief/schema.ts';
import { RequestError } from '../../src/domain/errors.ts';

function problemsOf(text: string | Uint8Array): string[] {
  try {
    parseBrief(text, 'brief.yaml');
  } catch (error) {
    expect(error).toBeInstanceOf(RequestError);
    return (error as RequestError).message.split('\n');
  }
  throw new Error('the brief was accepted');
}

const FULL = `pinwright: 1
title: North bay roof
source: physical
axes: given
scope:
  include: [{class: IfcMember}, {assembly: "Truss *"}]
  exclude: [{name: "*handrail*"}]
joints:
  reach: 150 mm
  offset: 60 mm
  crossings: apart
chords: pinned
supports:
  - at: {near: [0, 0, 0], within: 50 mm}
    fix: xyz
  - at:
      - {lowest: true}
      - not: {level: "..4 m"}
        joins: {class: IfcColumn}
    fix: [z, {along: [1, 1, 0]}]
    spring: {x: 5 MN/m}
materials: {default: S355}
tensionOnly: []
compressionOnly: []
cases:
  - name: dead
    nature: permanent
    loads:
      - {selfWeight: 1.0}
      - {selfWeight: {factor: 1.1}}
      - {area: 0.6 kN/m2, over: {top: true}, acts: down, per: slope}
      - {line: [0, 0, -2 kN/m], on: {name: "P*", slope: 20 deg..40 deg}, per: length}
      - {point: [0, 0, -1700], at: {near: [6, 0, 4], within: 50 mm}}
combinations:
  - {name: ULS, limit: strength, factors: {dead: 1.35}}
checks: none
`;

describe('a brief that is right', () => {
  it('comes out in SI, with defaults and with the line of every rule', () => {
    const brief = parseBrief(FULL, 'brief.yaml');
    expect(brief.joints).toEqual({ reach: 0.15, offset: 0.06, crossings: 'apart', seated: 'node', pairs: 'one' });
    expect(brief.scope.include).toEqual([
      { line: 6, class: 'IfcMember' },
      { line: 6, assembly: 'Truss *' },
    ]);
    expect(brief.supports[0]).toEqual({
      line: 14,
      at: [{ line: 14, near: [0, 0, 0], within: 0.05 }],
      fix: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      springs: [],
    });
    expect(brief.supports[1]!.at).toEqual([
      { line: 17, lowest: true },
      { line: 18, joins: [{ line: 19, class: 'IfcColumn' }], not: { line: 18, level: [null, 4] } },
    ]);
    expect(brief.supports[1]!.fix).toEqual([
      [0, 0, 1],
      [Math.SQRT1_2, Math.SQRT1_2, 0].map((c) => expect.closeTo(c, 12)),
    ]);
    expect(brief.supports[1]!.springs).toEqual([{ direction: [1, 0, 0], stiffness: 5e6 }]);
    const [first, second, area, line, point] = brief.cases[0]!.loads;
    expect(first).toEqual({ kind: 'selfWeight', line: 29, factor: 1 });
    expect(second).toMatchObject({ factor: 1.1 });
    expect(area).toMatchObject({ kind: 'area', line: 31, pressure: 600, acts: 'down', per: 'slope' });
    expect(line).toMatchObject({ kind: 'line', force: [0, 0, -2000], per: 'length' });
    expect((line as unknown as { on: { slope: number[] }[] }).on[0]!.slope[1]).toBeCloseTo((40 * Math.PI) / 180, 12);
    expect(point).toMatchObject({ kind: 'point', force: [0, 0, -1700], at: [{ near: [6, 0, 4] }] });
    expect(brief.combinations).toEqual([{ line: 35, name: 'ULS', limit: 'strength', factors: { dead: 1.35 } }]);
  });

  it('may be JSON, with tabs and a byte order mark', () => {
    const text = '\uFEFF{\n\t"pinwright": 1,\n\t"supports": [\n\t\t{"at": {"lowest": true}, "fix": "xyz"}\n\t]\n}';
    expect(parseBrief(new TextEncoder().encode(text), 'brief.json').supports[0]!.line).toBe(4);
  });

  it('may be nothing but its version, and is then the default brief', () => {
    expect(parseBrief('pinwright: 1', 'brief.yaml')).toEqual(DEFAULT_BRIEF);
    expect(parseBrief('pinwright: 1\ncombinations: none\nchecks: {rule: none}\n', 'brief.yaml')).toEqual(DEFAULT_BRIEF);
  });

  it('has a JSON Schema that names its keys and references selectors', () => {
    const schema = z.toJSONSchema(briefInputSchema, { io: 'input' });
    expect(schema.required).toEqual(['pinwright']);
    expect(Object.keys(schema.properties ?? {})).toContain('supports');
    expect(Object.keys(schema.$defs ?? {}).sort()).toEqual(['memberSelector', 'nodeSelector']);
  });
});

describe('a brief that is wrong', () => {
  it('is told every problem at once, each with its place, its text and the nearest right word', () => {
    const text = [
      'pinwright: 1',
      'joints: {reech: 150 mm, offset: 60 kN}',
      'supports:',
      '  - at: {lowest: true}',
      '    fix: xxy',
      '  - at: {neer: [0, 0, 0], within: 50 mmm}',
      '    fix: z',
      'cases:',
      '  - name: dead',
      '    nature: permanant',
      '    loads: [{selfweight: 1}]',
    ].join('\n');
    expect(problemsOf(text)).toEqual([
      'brief.yaml:2:10: "reech": there is no such key here; did you mean "reach"?',
      'brief.yaml:2:33: "60 kN": this is a force; a length (mm, m, in, ft) is due',
      'brief.yaml:5:10: "xxy": the letters x, y and z, each once at most, {along: [1, 1, 0]}, or a list of these, is due',
      'brief.yaml:6:10: "neer": there is no such key here; did you mean "near"?',
      'brief.yaml:6:35: "50 mmm": "mmm" is no unit known here; a length (mm, m, in, ft) is due; did you mean "mm"?',
      'brief.yaml:10:13: "permanant": permanent, imposed, snow, wind, thermal or accidental is due; did you mean "permanent"?',
      'brief.yaml:11:14: "selfweight": there is no such key here; did you mean "selfWeight"?',
    ]);
  });

  const inCase = (load: string) => `pinwright: 1\ncases:\n  - name: a\n    nature: wind\n    loads:\n      - ${load}\n`;
  const inSupport = (rule: string) => `pinwright: 1\nsupports:\n  - ${rule}\n`;

  it.each([
    [
      'a value of the wrong kind',
      'pinwright: 1\njoints: {reach: true}',
      '2:17: "true": a length (mm, m, in, ft), or a list of',
    ],
    ['a quantity without its unit', 'pinwright: 1\njoints: {reach: "150"}', '2:17: "150": the unit is missing'],
    ['a decimal comma', 'pinwright: 1\njoints: {reach: "1,5 mm"}', 'decimal point'],
    ['a number that is not finite', 'pinwright: 1\njoints: {reach: 1e400}', '2:17: "1e400": a length'],
    ['a length that is not positive', 'pinwright: 1\njoints: {reach: -5 mm}', 'greater than zero'],
    [
      'a mass for a force',
      inCase('{area: 60 kg/m2, over: {top: true}, acts: down, per: plan}'),
      '6:16: "60 kg/m2": this is a mass per area',
    ],
    [
      'a unit in the wrong case',
      inCase('{area: 1 KN/m2, over: {top: true}, acts: down, per: plan}'),
      'did you mean "kN"?',
    ],
    [
      'a normal load in plan',
      inCase('{area: 1 kPa, over: {top: true}, acts: normal, per: plan}'),
      '6:61: "plan": a load normal to the surface',
    ],
    [
      'a missing key',
      inCase('{area: 1 kPa, over: {top: true}, acts: down}'),
      '6:9: "{area: 1 kPa, over: {top: true}, acts: down}": the key "per" is missing',
    ],
    ['a vector too short', inCase('{point: [0, 1], at: {top: true}}'), '6:17: "[0, 1]": a list of 3 is due'],
    ['a load that is no mapping', inCase('5'), '6:9: "5": a mapping'],
    [
      'near without within',
      inSupport('{at: {near: [0, 0, 0]}, fix: z}'),
      '3:10: "{near: [0, 0, 0]}": "near" and "within" go together',
    ],
    ['an empty selector', inSupport('{at: {}, fix: z}'), 'an empty selector would catch everything'],
    ['an empty list of selectors', inSupport('{at: [], fix: z}'), 'an empty list selects nothing'],
    ['a support that holds nothing', inSupport('{at: {top: true}}'), 'a support needs "fix" or "spring"'],
    [
      'a direction of no length',
      inSupport('{at: {top: true}, fix: {along: [0, 0, 0]}}'),
      'this direction has no length',
    ],
    ['a range of mixed units', inSupport('{at: {level: [2, 4000 mm]}, fix: z}'), 'give both their unit'],
    ['a range that runs backwards', inSupport('{at: {level: 5 m..4 m}, fix: z}'), 'runs backwards'],
    [
      'a slope in degrees without its unit',
      inCase('{line: [0, 0, 1], on: {slope: [20, 40]}, per: length}'),
      'write "20 deg..40 deg"',
    ],
    ['a number for a text', inCase('{line: [0, 0, 1], on: {tag: 17}, per: length}'), 'put it in quotes: "17"'],
    ['a doubled key', 'pinwright: 1\njoints:\n  reach: 1\n  reach: 2\n', '4:3: "reach": this key stands twice'],
    ['an anchor', 'pinwright: 1\njoints: &j {reach: 1}\n', '2:12: "&j": anchors are not allowed'],
    ['an alias', 'pinwright: 1\ntitle: *t\n', 'brief.yaml:2:'],
    ['a tag of its own', 'pinwright: 1\ntitle: !shell ls\n', '2:8: "!shell": Unresolved tag'],
    ['broken syntax', 'pinwright: 1\njoints: {reach: 1\n', 'brief.yaml:3:1: '],
    ['two documents', 'pinwright: 1\n---\npinwright: 1\n', 'brief.yaml:2:1: '],
    ['an old YAML', '%YAML 1.1\n---\npinwright: 1\n', 'a brief is YAML 1.2'],
    ['a key that is a list', 'pinwright: 1\n? [a, b]\n: 1\n', '2:3: a key is one word'],
    [
      'a key named for a trap',
      'pinwright: 1\n__proto__: {axes: given}\n',
      '2:1: "__proto__": there is no such key here',
    ],
    ['nothing', '', '1:1: the brief is empty'],
    ['nothing but a comment', '# later\n', '1:1: the brief is empty'],
    ['a list', '- 1\n', 'a brief is a mapping that begins with "pinwright: 1"'],
    ['no version', 'title: x\n', '1:1: the key "pinwright: 1" is missing'],
    ['another version', 'pinwright: 2\n', '1:12: "2": this version reads briefs of "pinwright: 1"'],
    [
      'two cases of one name',
      'pinwright: 1\ncases:\n  - {name: a, nature: wind, loads: []}\n  - {name: a, nature: wind, loads: []}\n',
      '4:12: "a": this name is taken',
    ],
    [
      'a factor of no case',
      'pinwright: 1\ncases: [{name: dead, nature: permanent, loads: []}]\ncombinations:\n  - {name: u, limit: strength, factors: {daed: 1}}\n',
      '4:42: "daed": there is no such case; did you mean "dead"?',
    ],
  ])('says so of %s', (_, text, expected) => {
    const problems = problemsOf(text);
    expect(problems.join('\n')).toContain(expected);
    for (const problem of problems) expect(problem).toMatch(/^brief\.yaml:\d+:\d+: /u);
  });

  it.each([
    ['chords: continuous', '2:9: "continuous": this'],
    ['checks: {rule: "EN1993-1-1:2005"}', '"EN1993-1-1:2005": this'],
    ['checks: AISC360', '2:9: "AISC360": this'],
  ])('is told that %s is not available yet, and nothing else', (line, expected) => {
    const problems = problemsOf(`pinwright: 1\n${line}\n`);
    expect(problems).toHaveLength(1);
    expect(problems[0]).toContain(expected);
    expect(problems[0]).toContain('is not available yet');
  });

  it.each([
    ['scope: {include: {property: {Span: 3}}}', 'write the set and the property'],
    ['scope: {include: {property: {}}}', 'name a property'],
    ['scope: {include: {property: {A.B: {}}}}', 'true, false, a number in SI, a text, or a range'],
    ['scope: {include: {property: {A.B: [1]}}}', 'is due'],
  ])('is told how a property is selected: %s', (line, expected) => {
    const problems = problemsOf(`pinwright: 1\n${line}\n`);
    expect(problems).toHaveLength(1);
    expect(problems[0]).toContain(expected);
  });

  it('is refused where it is not UTF-8, with the place of the first wrong byte', () => {
    const bytes = new Uint8Array([...new TextEncoder().encode('pinwright: 1\ntitle: a'), 0xff]);
    expect(problemsOf(bytes)).toEqual(['brief.yaml:2:9: this is not UTF-8; save the brief as UTF-8']);
  });

  it('is refused where it is larger than 1 MiB', () => {
    const text = `pinwright: 1\n#${' '.repeat(LARGEST_BRIEF)}`;
    expect(problemsOf(text)[0]).toContain('a brief is at most 1048576 bytes (1 MiB)');
  });

  it('is refused where it is nested absurdly, without a crash', () => {
    for (const text of [
      '['.repeat(20_000),
      '- '.repeat(20_000),
      `pinwright: 1\na: ${'{a: '.repeat(5000)}${'}'.repeat(5000)}`,
    ]) {
      expect(problemsOf(text)[0]).toMatch(/^brief\.yaml:\d+:\d+: /u);
    }
  });

  it('never has its control characters echoed', () => {
    expect(problemsOf('pinwright: 1\n"a\\e[31m\\u202E": 1\n')[0]).toMatch(/^[\x20-\x7e]+$/u);
    expect(problemsOf('pinwright: 1\naxes: "\u001b[31mgiven"\n').join('')).not.toContain('\u001b');
  });

  it('lists at most a hundred problems and says how many more there are', () => {
    const keys = Array.from({ length: 150 }, (_, i) => `wrong${i}: 1`).join('\n');
    const problems = problemsOf(`pinwright: 1\n${keys}\n`);
    expect(problems).toHaveLength(101);
    expect(problems.at(-1)).toBe('brief.yaml: and 50 more');
  });
});
