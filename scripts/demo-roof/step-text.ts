import type { StepRef } from '../../src/step/values.ts';
import { encodeString, InstanceWriter, type ValueToWrite } from '../../src/step/write.ts';

/** A fixed time, so that the same model is the same bytes. */
const TIME_STAMP = '2026-03-02T08:00:00';

/** A whole ISO 10303-21 file, instance by instance. */
export class StepText {
  readonly #writer = new InstanceWriter(1);

  add(entity: string, ...values: readonly ValueToWrite[]): StepRef {
    return this.#writer.add(entity.toUpperCase(), ...values.map(rounded));
  }

  file(schema: string, name: string, description: string): string {
    const [about, fileName] = [description, name].map(encodeString);
    return [
      'ISO-10303-21;',
      'HEADER;',
      `FILE_DESCRIPTION((${about}),'2;1');`,
      `FILE_NAME(${fileName},'${TIME_STAMP}',('demo'),('invented scenario'),'demo-roof','demo-roof','');`,
      `FILE_SCHEMA((${encodeString(schema)}));`,
      'ENDSEC;',
      'DATA;',
      ...this.#writer.take(),
      'ENDSEC;',
      'END-ISO-10303-21;',
      '',
    ].join('\n');
  }
}

/** To ten decimals: no machine's last digit shows, and directions stay good to a micrometre over the hall's length. */
function rounded(value: ValueToWrite): ValueToWrite {
  if (typeof value === 'number') return Math.round(value * 1e10) / 1e10;
  return Array.isArray(value) ? value.map(rounded) : value;
}
