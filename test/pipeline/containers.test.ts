import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { annotate } from '../../src/exporter/ifc/annotate.ts';
import { type Run, runModel } from '../../src/pipeline.ts';
import { xmlOfStep } from '../importer/files/support/xml-of-step.ts';
import { zipOf } from '../importer/files/support/zip.ts';
import { fixture } from '../support/shared.ts';

const NAME = 'boat-hall-a.ifc';
const step = readFileSync(fixture(NAME));
const annotated = ({ file, result }: Run): Buffer =>
  Buffer.concat([...annotate(file, result)].map((chunk) => Buffer.from(chunk)));

describe('the demo roof in a zip and as ifcXML', () => {
  let plain: Run;
  let zipped: Run;
  let converted: Run;

  beforeAll(async () => {
    plain = await runModel(step);
    zipped = await runModel(zipOf([{ name: NAME, content: step }]));
    converted = await runModel(Buffer.from(await xmlOfStep(step)));
  }, 60_000);

  it('gives the same result from the zip, with the hash of the model in it', () => {
    expect(zipped.result).toEqual(plain.result);
    expect(annotated(zipped).equals(annotated(plain))).toBe(true);
  });

  it('gives the same result from ifcXML, but for the hash and the time stamp, which this ifcXML does not have', () => {
    const { model, ...rest } = converted.result;
    const {
      model: { written, ...plainModel },
      ...plainRest
    } = plain.result;
    expect(written).toBeDefined();
    expect(rest).toEqual(plainRest);
    expect(model).toEqual({ ...plainModel, sha256: model.sha256 });
    expect(model.sha256).not.toBe(plainModel.sha256);
  });

  it('writes of ifcXML an .ifc that is the same model when it is read again', async () => {
    const written = annotated(converted);
    const again = await runModel(written);
    expect(again.result).toEqual(converted.result);
    expect(annotated(again).equals(written)).toBe(true);
  });
});
