import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ModelError } from '../../../src/domain/errors.ts';
import { openModel } from '../../../src/importer/files/open-model.ts';
import type { OpenOptions } from '../../../src/importer/files/options.ts';
import { importModel } from '../../../src/importer/import-model.ts';
import { publicModel } from '../../support/shared.ts';
import { COMMON, stepText } from '../support/model-text.ts';
import { FRAME_IFC4_XML } from './support/frame.ts';
import { type ToZip, zipOf } from './support/zip.ts';

const STEP = stepText(COMMON);
const MODEL: ToZip = { name: 'roof.ifc', content: STEP };

async function refusal(bytes: Uint8Array, options: Partial<OpenOptions> = {}): Promise<string> {
  const problem = await openModel(bytes, options).then(
    () => null,
    (error: unknown) => error,
  );
  expect(problem).toBeInstanceOf(ModelError);
  return (problem as Error).message;
}

describe('what a file is, by its content', () => {
  it('is STEP text where it begins so, also after a mark, white space and comments', async () => {
    for (const text of [STEP, `\ufeff${STEP}`, `\r\n ${STEP}`, `/* x */ ${STEP}`]) {
      const opened = await openModel(Buffer.from(text));
      expect(opened).toMatchObject({ container: 'ifc', modelName: null, isConverted: false, findings: [] });
      expect(opened.file.schema).toBe('IFC4');
    }
  });

  it('keeps the very bytes of STEP text', async () => {
    const bytes = Buffer.from(STEP);
    expect((await openModel(bytes)).file.bytes).toBe(bytes);
  });

  it.each([
    ['nothing', Buffer.alloc(0), /empty/],
    ['plain words', Buffer.from('Dear Sir or Madam'), /does not begin with ISO-10303-21/],
    ['gzip', Buffer.from([0x1f, 0x8b, 8, 0]), /gzip archive.*unpack it/],
    ['7z', Buffer.from([0x37, 0x7a, 0xbc, 0xaf, 0x27, 0x1c]), /7z archive/],
    ['STEP text in UTF-16', Buffer.from(`\ufeff${STEP}`, 'utf16le'), /UTF-16/],
  ])('refuses %s', async (_what, bytes, told) => {
    expect(await refusal(bytes)).toMatch(told);
  });
});

describe('a zip', () => {
  it.each([
    ['stored', zipOf([{ ...MODEL, method: 0 }])],
    ['deflated', zipOf([MODEL])],
    ['with data descriptors', zipOf([{ ...MODEL, flags: 0x08 }])],
    ['with 64-bit sizes', zipOf([MODEL], 'zip64')],
    ['with a UTF-8 name', zipOf([{ ...MODEL, flags: 0x800 }])],
    ['in bytes that are part of larger ones', Buffer.concat([Buffer.from('xx'), zipOf([MODEL])]).subarray(2)],
  ])('gives its model where it is %s', async (_how, bytes) => {
    const { file, ...rest } = await openModel(bytes);
    expect(rest).toEqual({ container: 'ifczip', modelName: 'roof.ifc', isConverted: false, findings: [] });
    expect(Buffer.from(file.bytes).toString()).toBe(STEP);
  });

  it('gives an ifcXML as STEP text made of it', async () => {
    const opened = await openModel(zipOf([{ name: 'roof.ifcxml', content: FRAME_IFC4_XML }]));
    expect(opened).toMatchObject({ container: 'ifczip', modelName: 'roof.ifcxml', isConverted: true });
    expect(opened.file.idsOf('IFCBEAM')).toHaveLength(1);
  });

  it('finds the model among folders, notes, STEP parts of other kinds and what file managers leave', async () => {
    const { modelName } = await openModel(
      zipOf([
        { name: 'north/', content: '', method: 0 },
        { name: '__MACOSX/north/._roof.ifc', content: STEP },
        { name: 'north/._roof.ifc', content: STEP },
        { name: '.DS_Store', content: 'x' },
        { name: 'readme.txt', content: 'ISO-10303-21 is the format' },
        { name: 'bolt.stp', content: stepText('', 'AUTOMOTIVE_DESIGN') },
        { name: 'data.xml', content: '<list><IfcBeam/></list>' },
        { name: 'north/roof.dat', content: STEP },
      ]),
    );
    expect(modelName).toBe('roof.dat');
  });

  it.each([
    ['climbs', '../../../etc/roof.ifc'],
    ['climbs in the manner of Windows', '..\\..\\roof.ifc'],
    ['begins at the root', '/etc/roof.ifc'],
    ['names a drive', 'C:/Windows/roof.ifc'],
  ])('reads a model whose name %s, without its folders', async (_how, name) => {
    expect((await openModel(zipOf([{ ...MODEL, name }]))).modelName).toBe('roof.ifc');
  });

  it('says which models there are where it holds several', async () => {
    const message = await refusal(zipOf([MODEL, { name: 'old/roof\n1.ifc', content: STEP, flags: 0x800 }]));
    expect(message).toBe(
      'The zip holds 2 IFC models (roof.ifc, old/roof?1.ifc); leave one in it, or unpack it and name one.',
    );
  });

  it.each([
    ['nothing', zipOf([]), 'The zip holds no IFC model. Put one into it.'],
    [
      'a note',
      zipOf([{ name: 'a.txt', content: 'x' }]),
      'The zip holds no IFC model (it holds a.txt). Put one into it.',
    ],
    [
      'an empty model',
      zipOf([{ name: 'a.ifc', content: '' }]),
      'The zip holds no IFC model (it holds a.ifc). Put one into it.',
    ],
    [
      'a zip',
      zipOf([{ name: 'a.ifczip', content: zipOf([MODEL]) }]),
      'The zip holds no IFC model (it holds a.ifczip). Put one into it.',
    ],
  ])('is refused where it holds %s', async (_what, bytes, message) => {
    expect(await refusal(bytes)).toBe(message);
  });

  it.each([
    [9, 'Deflate64'],
    [12, 'BZIP2'],
    [14, 'LZMA'],
    [93, 'Zstandard'],
    [77, 'method 77'],
  ])('says that method %i (%s) is not read, and what to do', async (method, name) => {
    expect(await refusal(zipOf([{ ...MODEL, method }]))).toBe(
      `roof.ifc in the zip is packed by ${name}, which is not read; pack it again by Deflate.`,
    );
  });

  it('says that a model is encrypted', async () => {
    expect(await refusal(zipOf([{ ...MODEL, flags: 1 }]))).toMatch(/encrypted; pack it again without a password/);
  });

  it.each([
    ['a wrong checksum', { crc: 7 }],
    ['more content than it says', { size: 100 }],
    ['less content than it says', { size: STEP.length + 1 }],
  ])('is damaged where the model has %s', async (_what, wrong) => {
    expect(await refusal(zipOf([{ ...MODEL, ...wrong }]))).toMatch(/roof\.ifc in the zip is damaged/);
  });

  it('is refused wherever it is cut off', async () => {
    const bytes = zipOf([MODEL]);
    for (let length = 4; length < bytes.length; length += 7) {
      expect(await refusal(bytes.subarray(0, length))).toMatch(/damaged|cut off/);
    }
  });

  const padded = `${STEP}${' '.repeat(1 << 20)}`;

  it('is a bomb where it grows more than 200 times', async () => {
    expect(await refusal(zipOf([{ ...MODEL, content: padded }]))).toMatch(/more than 200 times/);
    expect(await refusal(zipOf([{ ...MODEL, content: padded, size: 1000 }]))).toMatch(/damaged/);
    expect((await openModel(zipOf([{ ...MODEL, content: padded }]), { ratio: 2000 })).file.size).toBeGreaterThan(0);
  });

  it('is refused where the model is larger than the limit, or says so', async () => {
    expect(await refusal(zipOf([MODEL]), { largest: 100 })).toMatch(/more than the limit/);
    expect(await refusal(zipOf([{ ...MODEL, size: 2 ** 31 + 1 }]))).toMatch(/more than the limit of 2048 MiB/);
  });

  it('is refused where it holds very many files', async () => {
    const files = Array.from({ length: 1001 }, (_, i) => ({ name: `${i}.txt`, content: '' }));
    expect(await refusal(zipOf([...files, MODEL]))).toMatch(/more than 1000 files/);
  });

  it('gives the right model or a ModelError, whatever bytes are changed', async () => {
    const original = zipOf([MODEL, { name: 'a.txt', content: 'note' }]);
    await fc.assert(
      fc.asyncProperty(fc.nat(original.length - 1), fc.nat(255), async (at, byte) => {
        const bytes = Buffer.from(original);
        bytes[at] = byte;
        try {
          const { file } = await openModel(bytes);
          expect(Buffer.from(file.bytes).toString()).toBe(STEP);
        } catch (error) {
          if (!(error instanceof ModelError)) throw error;
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('ifcXML with bytes changed', () => {
  it('gives a model or a ModelError', async () => {
    const original = Buffer.from(FRAME_IFC4_XML);
    await fc.assert(
      fc.asyncProperty(fc.nat(original.length - 1), fc.nat(255), fc.nat(20), async (at, byte, gone) => {
        const bytes = Buffer.concat([original.subarray(0, at), Buffer.from([byte]), original.subarray(at + gone)]);
        try {
          const { file } = await openModel(bytes);
          for (const id of file.ids()) file.args(id);
        } catch (error) {
          if (!(error instanceof ModelError)) throw error;
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe('public models', () => {
  const lintels = publicModel('brep-lintels.ifczip');
  it.skipIf(lintels === null)('brep-lintels.ifczip has 35 elements', async () => {
    const { file, ...rest } = await openModel(readFileSync(lintels!));
    expect(rest).toMatchObject({ container: 'ifczip', modelName: 'IFC-Vebo.ifc', isConverted: false });
    const { elementCount, schema, members, findings } = await importModel(file);
    expect({ elementCount, schema }).toEqual({ elementCount: 35, schema: 'IFC2X3' });
    expect(new Set([...members.map((m) => m.globalId), ...findings.flatMap((f) => f.members)]).size).toBe(35);
  });

  const surface = publicModel('surface-member.ifcxml');
  it.skipIf(surface === null)('surface-member.ifcxml has its structural view and no members', async () => {
    const { file, container, findings } = await openModel(readFileSync(surface!));
    expect({ container, findings, problems: file.problems }).toEqual({
      container: 'ifcxml',
      findings: [],
      problems: [],
    });
    expect(file.idsOf('IFCSTRUCTURALSURFACEMEMBER')).toHaveLength(1);
    expect(file.idsOf('IFCCARTESIANPOINT')).toHaveLength(11);
    expect((await importModel(file)).lengthUnit).toBe('mm');
  });

  const wall = publicModel('wall-ifcxml.ifczip');
  it.skipIf(wall === null)('wall-ifcxml.ifczip has its wall with an opening, and decimal commas', async () => {
    const opened = await openModel(readFileSync(wall!));
    expect(opened).toMatchObject({
      container: 'ifczip',
      modelName: 'wall-with-opening-and-window.ifcxml',
      isConverted: true,
    });
    expect(opened.findings.map(({ code }) => code)).toEqual(['encoding-broken']);
    expect(opened.file.idsOf('IFCRELVOIDSELEMENT')).toHaveLength(1);
    expect((await importModel(opened.file)).members).toEqual([]);
  });
});
