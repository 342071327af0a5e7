import { describe, expect, it } from 'vitest';
import { joinChunks } from '../../src/exporter/chunks.ts';
import { annotate } from '../../src/exporter/ifc/annotate.ts';
import { zipOne } from '../../src/exporter/zip-one.ts';
import { openModel } from '../../src/importer/files/open-model.ts';
import { openStep } from '../../src/step/step-file.ts';
import { BEAM, model } from './ifc/models.ts';
import { someResult } from './support.ts';

describe('an annotated model in a zip', () => {
  const file = openStep(Buffer.from(model('IFC4'), 'latin1'));
  const result = someResult([BEAM]);
  const zipped = () => joinChunks(zipOne('frame.ifc', annotate(file, result)));

  it('is read back as the same model under its name', async () => {
    const { file: back, container, modelName } = await openModel(zipped());
    expect({ container, modelName }).toEqual({ container: 'ifczip', modelName: 'frame.ifc' });
    expect(Buffer.compare(Buffer.from(back.bytes), joinChunks(annotate(file, result)))).toBe(0);
  });

  it('has the same bytes every time, and fewer', () => {
    expect(Buffer.compare(zipped(), zipped())).toBe(0);
    expect(zipped().length).toBeLessThan(joinChunks(annotate(file, result)).length);
  });

  it('is packed piece by piece', () => {
    let given = 0;
    function* noise() {
      for (let k = 0; k < 40; k++) {
        given++;
        yield Uint8Array.from({ length: 1 << 16 }, (_, i) => (i * 7919 * (k + 1)) >>> 5);
      }
    }
    const pieces = zipOne('noise.ifc', noise());
    pieces.next();
    pieces.next();
    expect(given).toBeLessThan(40);
  });
});
